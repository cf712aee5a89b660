import { fitInFrame } from "../frame-fit";
import type { FrameSpec } from "../frames";
import { meshBounds } from "../mesh";
import type { PlacedModel } from "./cooler-place";

/** What a season allows, mm; null is no limit. */
export interface FanLimits {
  readonly totalDepthMaxMm: number | null;
  readonly inletStackMaxMm: number | null;
}

/** A placed model against frames and limits. */
export interface LimitsJudgement {
  /** Nominal gap between the widest rotor and the bore, mm. */
  readonly tipGapMm: number;
  /** Smallest of tip gaps and end gaps after tolerance, mm; below zero where something is too large. */
  readonly smallestClearanceMm: number;
  /** Extent along the axis of all that the file holds, or of the frames where they are longer, mm. */
  readonly depthMm: number;
  /** What reaches past the frames on the inlet side, away from the cooler, mm. */
  readonly inletMm: number;
  /** What doesn't fit and what to change; empty where all does. */
  readonly reasons: string[];
}

const mm = (value: number): string => `${Math.round(value * 100) / 100} mm`;

/** Each rotor in a frame of its own, and the whole against a season's limits. Throws a RangeError without rotors. */
export function judgeLimits(model: PlacedModel, frame: FrameSpec, limits: FanLimits): LimitsJudgement {
  if (model.zones.length === 0) throw new RangeError("a fit needs a rotor");
  const stack = frame.depthMm * model.zones.length;
  const bounds = meshBounds(model.mesh);
  const [low, high] = [bounds?.min[2] ?? 0, bounds?.max[2] ?? stack];
  const depthMm = Math.max(high, stack) - Math.min(low, 0);
  const inletMm = Math.max(0, high - stack);
  const fits = model.zones.map((zone) =>
    fitInFrame([{ diameterMm: zone.sweptDiameterMm, fromZMm: zone.fromMm, toZMm: zone.toMm }], frame),
  );
  const reasons = fits.flatMap((fit, index) =>
    fit.reasons.map((reason) => (fits.length > 1 ? `Rotor ${index + 1}: ${reason}` : reason)),
  );
  const over = (name: string, value: number, limit: number | null): void => {
    if (limit === null || value <= limit) return;
    reasons.push(`${name}: ${mm(value)}, and ${mm(limit)} are allowed: make it ${mm(value - limit)} shorter.`);
  };
  over("Depth in all", depthMm, limits.totalDepthMaxMm);
  over("Inlet stack", inletMm, limits.inletStackMaxMm);
  const widest = Math.max(...model.zones.map((zone) => zone.sweptDiameterMm));
  return {
    tipGapMm: (frame.boreMm - widest) / 2,
    smallestClearanceMm: Math.min(...fits.map((fit) => fit.smallestClearanceMm)),
    depthMm,
    inletMm,
    reasons,
  };
}
