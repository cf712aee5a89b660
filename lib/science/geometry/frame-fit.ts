import type { FrameSpec } from "./frames";

/** The cylinder that a rotor sweeps, along the common axis. */
export interface SweptCylinder {
  readonly diameterMm: number;
  readonly fromZMm: number;
  readonly toZMm: number;
}

/** Whether rotors fit a frame. */
export interface FrameFit {
  readonly fits: boolean;
  /** Smallest of tip gap and half the room left along the axis, after tolerance, mm; below zero where they collide. */
  readonly smallestClearanceMm: number;
  /** What is too large and by how much; empty when it fits. */
  readonly reasons: string[];
}

const mm = (value: number): string => `${Math.round(value * 100) / 100} mm`;

/**
 * Fits the swept cylinders of all rotors, stacked as they are in the file, into one frame: centred in its bore and in
 * its depth. Throws a RangeError without rotors, as nothing can be said then.
 */
export function fitInFrame(swept: readonly SweptCylinder[], frame: FrameSpec): FrameFit {
  if (swept.length === 0) throw new RangeError("a fit needs a rotor");
  const diameter = Math.max(...swept.map((rotor) => rotor.diameterMm));
  const depth = Math.max(...swept.map((rotor) => rotor.toZMm)) - Math.min(...swept.map((rotor) => rotor.fromZMm));
  const tipGapMm = (frame.boreMm - diameter) / 2 - frame.toleranceMm;
  const endGapMm = (frame.depthMm - depth) / 2 - frame.toleranceMm;
  const reasons: string[] = [];
  if (tipGapMm < 0) {
    const change = `make the swept diameter ${mm(-2 * tipGapMm)} smaller`;
    reasons.push(
      `Tips: ${mm(diameter)} swept in a bore of ${mm(frame.boreMm)}, tolerance ${mm(frame.toleranceMm)} a side: ${change}.`,
    );
  }
  if (endGapMm < 0) {
    const change = `make it ${mm(-2 * endGapMm)} shorter`;
    reasons.push(
      `Depth: ${mm(depth)} along the axis in a frame of ${mm(frame.depthMm)}, tolerance ${mm(frame.toleranceMm)} an end: ${change}.`,
    );
  }
  return { fits: reasons.length === 0, smallestClearanceMm: Math.min(tipGapMm, endGapMm), reasons };
}
