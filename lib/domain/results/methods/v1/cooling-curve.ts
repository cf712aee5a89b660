import type { Pchip } from "@/lib/science/statistics/pchip";
import { combineEffects, type Effect } from "../../effects";
import { curveKnots, curveThrough, insideRange, knotsAround, knotSensitivities, type CurveKnot } from "./curve";
import type { SetSpeedPoint } from "./set-speed-points";

/** ΔT/P (and ΔT) of a subject over its corrected level, one session and one microphone position. */
export type CoolingCurve = {
  readonly points: readonly SetSpeedPoint[];
  readonly resistanceKnots: readonly CurveKnot[];
  /** K/W over dB(A). */
  readonly resistance: Pchip;
  readonly deltaTKnots: readonly CurveKnot[];
  /** K over dB(A). */
  readonly deltaT: Pchip;
};

/**
 * The cooling curve by PCHIP (Fritsch and Butland 1984). Undefined for fewer than two different levels.
 * A curve that isn't monotone keeps its points and is read as it is; see `risesWithLevel`.
 */
export function coolingCurve(points: readonly SetSpeedPoint[]): CoolingCurve | undefined {
  const levels = points.map((point) => point.correctedDba);
  const resistanceKnots = curveKnots(
    levels,
    points.map((point) => point.resistanceKPerW),
  );
  const deltaTKnots = curveKnots(
    levels,
    points.map((point) => point.deltaTK),
  );
  const resistance = curveThrough(resistanceKnots);
  const deltaT = curveThrough(deltaTKnots);
  return resistance && deltaT ? { points, resistanceKnots, resistance, deltaTKnots, deltaT } : undefined;
}

/** Whether ΔT/P rises with level anywhere between neighbouring knots: kept, flagged, never deleted. */
export function risesWithLevel(curve: CoolingCurve): boolean {
  return curve.resistanceKnots.some((knot, i) => knot.y > (curve.resistanceKnots[i - 1]?.y ?? Infinity));
}

/** Whether the curve at a level lies at or between knots that hold a bound (a background too near). */
export function restsOnBound(curve: CoolingCurve, levelDba: number): boolean {
  return knotsAround(curve.resistanceKnots, levelDba).some((knot) =>
    knot.members.some((i) => curve.points[i]?.upperBound === true),
  );
}

export type CurveReading = {
  readonly value: number;
  /** Per dB. */
  readonly slope: number;
  /** What each source does to the value read at this fixed level. */
  readonly effects: readonly Effect[];
  /** How far the value would rise were every bound taken at its level as read: 0 without bounds. */
  readonly boundAllowance: number;
};

/** ΔT/P in K/W at a level inside the range (ends count as inside), or undefined outside. */
export function readResistance(curve: CoolingCurve, levelDba: number): CurveReading | undefined {
  return read(curve, curve.resistance, curve.resistanceKnots, levelDba, (point) => 1 / point.powerW);
}

/** ΔT in K at a level inside the range (ends count as inside), or undefined outside. */
export function readDeltaT(curve: CoolingCurve, levelDba: number): CurveReading | undefined {
  return read(curve, curve.deltaT, curve.deltaTKnots, levelDba, () => 1);
}

function read(
  curve: CoolingCurve,
  line: Pchip,
  knots: readonly CurveKnot[],
  levelDba: number,
  perKelvin: (point: SetSpeedPoint) => number,
): CurveReading | undefined {
  const inside = insideRange(line, levelDba);
  const value = inside === undefined ? undefined : line.value(inside);
  const slope = inside === undefined ? undefined : line.slope(inside);
  if (inside === undefined || value === undefined || slope === undefined) return undefined;
  const sensitivities = knotSensitivities(knots, inside);
  let boundAllowance = 0;
  const terms = knots.flatMap((knot, k) =>
    knot.members.flatMap((i) => {
      const point = curve.points[i];
      const sensitivity = sensitivities[k];
      if (!point || !sensitivity) return [];
      const byLevel = sensitivity.byX / knot.members.length;
      const byDeltaT = (sensitivity.byY * perKelvin(point)) / knot.members.length;
      if (point.upperBound) boundAllowance += Math.max(0, byLevel * point.correctionDb);
      return [
        { factor: byLevel, effects: point.levelEffects },
        { factor: byDeltaT, effects: point.deltaTEffects },
      ];
    }),
  );
  return { value, slope, effects: combineEffects(terms), boundAllowance };
}
