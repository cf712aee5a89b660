import { inletStackReadsHigh } from "@/lib/science/acoustics/positions";
import type { RotorSet } from "@/lib/science/acoustics/fan-tones";

/** Rotors as a person types them: "11, 7" and "1806 1806", rotor 1 first. */
export interface TypedRotors {
  blades: string;
  rpm: string;
  rotation: "" | "counter" | "co";
  struts: string;
}

const numbers = (text: string): number[] =>
  text.split(/[\s,;]+/).flatMap((part) => (part === "" ? [] : [Number(part)]));

/**
 * The rotors that tones are predicted from, or what is wrong with them by field; null where none are given. One or two
 * rotors; blades whole, speeds in rpm above 0.
 */
export function typedRotors(typed: TypedRotors): { rotors: RotorSet | null } | { wrong: Record<string, string> } {
  const [blades, rpm] = [numbers(typed.blades), numbers(typed.rpm)];
  if (blades.length === 0 && rpm.length === 0) return { rotors: null };
  const wrong: Record<string, string> = {};
  if (blades.length < 1 || blades.length > 2 || !blades.every((n) => Number.isInteger(n) && n >= 1 && n <= 200)) {
    wrong.blades = "One or two whole numbers from 1 to 200, rotor 1 first.";
  }
  if (rpm.length !== blades.length || !rpm.every((n) => n > 0 && n <= 100_000)) {
    wrong.rpm = "A speed in rpm for each blade count.";
  }
  const struts = typed.struts.trim() === "" ? 0 : Number(typed.struts);
  if (!(Number.isInteger(struts) && struts >= 0 && struts <= 200)) wrong.struts = "A whole number from 0 to 200.";
  if (Object.keys(wrong).length > 0) return { wrong };
  const rotation = typed.rotation !== "" && blades.length === 2 ? { rotation: typed.rotation } : {};
  return { rotors: { blades, rpm, ...rotation, ...(struts > 0 && { struts }) } };
}

/**
 * Positions on the axis at which an inlet stack of a height in mm may read high: it takes a fifth of their distance or
 * more. A reading is never corrected for it. House rule, no source.
 */
export function positionsReadHigh<P extends { distanceMm: number; angleDeg: number }>(
  positions: readonly P[],
  inletStackMm: number,
): P[] {
  if (!(inletStackMm > 0)) return [];
  return positions.filter((each) => each.angleDeg === 0 && inletStackReadsHigh(inletStackMm, each.distanceMm));
}
