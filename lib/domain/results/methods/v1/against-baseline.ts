import { combineEffects, type Effect } from "../../effects";
import type { SetSpeedPoint } from "./set-speed-points";

export type Figure = { readonly value: number; readonly effects: readonly Effect[] };

/** One point against the baseline's point at the same set speed and session. */
export type AgainstBaseline = {
  /** Level less the baseline's, dB. A bound on either side makes it a bound too. */
  readonly levelDifferenceDb: Figure;
  readonly levelIsBound: boolean;
  /** ΔT less the baseline's, K: the offset cancels, the gain acts on the difference only. */
  readonly deltaTDifferenceK: Figure;
  /** (ΔT/P) ÷ (ΔT/P of the baseline): the gain cancels. */
  readonly resistanceRatio: Figure;
};

/** Difference and ratio with shared parts cancelled (JCGM 100:2008, 5.2.2 with F.1.2.3). Both points of one session. */
export function againstBaseline(point: SetSpeedPoint, baseline: SetSpeedPoint): AgainstBaseline {
  const less = (effects: readonly Effect[], baselineEffects: readonly Effect[]) =>
    combineEffects([
      { factor: 1, effects },
      { factor: -1, effects: baselineEffects },
    ]);
  const ratio = point.resistanceKPerW / baseline.resistanceKPerW;
  return {
    levelDifferenceDb: {
      value: point.correctedDba - baseline.correctedDba,
      effects: less(point.levelEffects, baseline.levelEffects),
    },
    levelIsBound: point.upperBound || baseline.upperBound,
    deltaTDifferenceK: {
      value: point.deltaTK - baseline.deltaTK,
      effects: less(point.deltaTEffects, baseline.deltaTEffects),
    },
    resistanceRatio: {
      value: ratio,
      effects: combineEffects([
        { factor: ratio / point.deltaTK, effects: point.deltaTEffects },
        { factor: -ratio / baseline.deltaTK, effects: baseline.deltaTEffects },
      ]),
    },
  };
}
