import { combineEffects, type Effect } from "../../effects";
import { readDeltaT, readResistance, restsOnBound, type CoolingCurve } from "./cooling-curve";

/** Why a level gives no figure. */
export type NotReached = {
  readonly levelDba: number;
  readonly why: "entry-not-reached" | "baseline-not-reached" | "baseline-rests-on-bound";
};

export type EqualNoiseReading = {
  readonly levelDba: number;
  /** (ΔT/P) ÷ (ΔT/P of the session's baseline), both at this level; below 1 cools better. */
  readonly ratio: number;
  readonly ratioEffects: readonly Effect[];
  /** The ratio times the baseline's ΔT at this level, K. */
  readonly deltaTK: number;
  readonly deltaTEffects: readonly Effect[];
  /** deltaTK less the baseline's ΔT at this level, K. */
  readonly differenceK: number;
  readonly differenceEffects: readonly Effect[];
  /** The entry's curve rests on a bound here: its true ratio is at or below the one given. */
  readonly upperBound: boolean;
  /** How far the ratio would rise were the entry's bounds taken at their levels as read. */
  readonly boundAllowance: number;
};

/**
 * An entry against the baseline of its session at one level. Read inside the range of both curves, ends counted in,
 * never outside; where the baseline's curve rests on a bound the comparison would flatter, so the level counts as not
 * reached. A curve that is undefined (fewer than two levels) reaches nothing.
 *
 * Uncertainty: first order in every source (u² = u_T² + slope²·u_L² for each), the baseline's own parts once, shared
 * parts with their signs: the gain cancels in the ratio, the ΔT offset acts on 1/ΔT_entry − 1/ΔT_baseline, the level
 * offset on the difference of the two relative slopes.
 */
export function equalNoise(
  entry: CoolingCurve | undefined,
  baseline: CoolingCurve | undefined,
  levelDba: number,
): EqualNoiseReading | NotReached {
  const below = baseline && readResistance(baseline, levelDba);
  const belowK = baseline && readDeltaT(baseline, levelDba);
  if (!baseline || !below || !belowK) return { levelDba, why: "baseline-not-reached" };
  if (restsOnBound(baseline, levelDba)) return { levelDba, why: "baseline-rests-on-bound" };
  const above = entry && readResistance(entry, levelDba);
  if (!entry || !above) return { levelDba, why: "entry-not-reached" };
  const ratio = above.value / below.value;
  const ratioEffects = combineEffects([
    { factor: 1 / below.value, effects: above.effects },
    { factor: -ratio / below.value, effects: below.effects },
  ]);
  const scaled = (offset: number) =>
    combineEffects([
      { factor: belowK.value, effects: ratioEffects },
      { factor: ratio - offset, effects: belowK.effects },
    ]);
  return {
    levelDba,
    ratio,
    ratioEffects,
    deltaTK: ratio * belowK.value,
    deltaTEffects: scaled(0),
    differenceK: (ratio - 1) * belowK.value,
    differenceEffects: scaled(1),
    upperBound: restsOnBound(entry, levelDba),
    boundAllowance: above.boundAllowance / below.value,
  };
}

/** Whether a level gave a figure. */
export function reached(reading: EqualNoiseReading | NotReached): reading is EqualNoiseReading {
  return "ratio" in reading;
}

export type EqualCoolingReading = {
  /** The entry's level where it cools as the baseline does at `levelDba`, dB(A). */
  readonly entryLevelDba: number;
  /** That level less `levelDba`, dB; below 0 is quieter. */
  readonly differenceDb: number;
  readonly effects: readonly Effect[];
};

/**
 * The level at equal ΔT/P: the baseline's value at a level, found on the entry's curve by its inverse (the same
 * interpolant, not a second one with swapped axes). Undefined where either has no such reading, where the baseline
 * rests on a bound, or where the entry's curve has no one answer. Effects are divided by the slope there.
 */
export function equalCooling(
  entry: CoolingCurve | undefined,
  baseline: CoolingCurve | undefined,
  levelDba: number,
): EqualCoolingReading | undefined {
  const below = baseline && readResistance(baseline, levelDba);
  if (!entry || !baseline || !below || restsOnBound(baseline, levelDba)) return undefined;
  const entryLevelDba = entry.resistance.inverse(below.value);
  const there = entryLevelDba === undefined ? undefined : readResistance(entry, entryLevelDba);
  if (entryLevelDba === undefined || there === undefined || there.slope === 0) return undefined;
  const effects = combineEffects([
    { factor: -1 / there.slope, effects: there.effects },
    { factor: 1 / there.slope, effects: below.effects },
  ]);
  return { entryLevelDba, differenceDb: entryLevelDba - levelDba, effects };
}
