import { Refusal } from "../refusal";

function checkLevels(levelsDb: readonly number[]): void {
  levelsDb.forEach((level, index) => {
    if (Number.isNaN(level) || level === Infinity) {
      throw new Refusal("level-not-a-number", `Level ${index + 1} is not a number.`, index + 1);
    }
  });
}

/** Σ wᵢ·10^(Lᵢ/10) as a level, shifted by the largest level so that no power overflows or vanishes. */
function weightedSumDb(levelsDb: readonly number[], weights: readonly number[] | undefined, divisor: number): number {
  const topDb = levelsDb.reduce((top, level) => Math.max(top, level), -Infinity);
  if (topDb === -Infinity) return -Infinity;
  let power = 0;
  levelsDb.forEach((level, index) => {
    power += (weights?.[index] ?? 1) * 10 ** ((level - topDb) / 10);
  });
  return topDb + 10 * Math.log10(power / divisor);
}

/**
 * Level of several uncorrelated sources together, in dB: L = 10 lg Σ 10^(Lᵢ/10).
 *
 * In: levels in dB, any order; -Infinity stands for no sound. Out: dB; undefined for an empty list. NaN and +Infinity
 * are refused. Phase-locked sources are not uncorrelated at their tones.
 * Source: definition of the sound pressure level (ISO 1996-1, energy addition).
 */
export function energySum(levelsDb: readonly number[]): number | undefined {
  if (levelsDb.length === 0) return undefined;
  checkLevels(levelsDb);
  return weightedSumDb(levelsDb, undefined, 1);
}

/**
 * Energy mean of levels, in dB: L = 10 lg[(1/Σw) Σ wᵢ·10^(Lᵢ/10)].
 *
 * In: levels in dB; weights, one a level, 0 or more and not all 0 (durations for sub-intervals; equal when left out).
 * Out: dB; undefined for an empty list. A weight list of another length, a negative weight or a sum of 0 is refused.
 * Source: ISO 3744:2010 Eq. (12).
 */
export function energyMean(levelsDb: readonly number[], weights?: readonly number[]): number | undefined {
  if (levelsDb.length === 0) return undefined;
  checkLevels(levelsDb);
  if (weights === undefined) return weightedSumDb(levelsDb, undefined, levelsDb.length);
  if (weights.length !== levelsDb.length) {
    throw new Refusal("weights-mismatch", `${weights.length} weights for ${levelsDb.length} levels.`);
  }
  const total = weights.reduce((sum, weight) => sum + (weight >= 0 ? weight : NaN), 0);
  if (!(total > 0 && Number.isFinite(total))) {
    throw new Refusal("weights-invalid", "Weights are finite, 0 or more, and not all 0.");
  }
  const counted = levelsDb.map((level, index) => (weights[index] === 0 ? -Infinity : level));
  return weightedSumDb(counted, weights, total);
}

/**
 * Level left when a part is taken out of a total, in dB: L = 10 lg(10^(L_tot/10) − 10^(L_part/10)).
 *
 * Defined only where the part is below the total; otherwise refused (code `part-not-below-total`).
 * Source: definition of the sound pressure level (energy subtraction of uncorrelated sources).
 */
export function energySubtract(totalDb: number, partDb: number): number {
  checkLevels([totalDb, partDb]);
  if (!(totalDb > partDb)) {
    throw new Refusal("part-not-below-total", "A part can only be taken out of a total that is above it.");
  }
  return totalDb + 10 * Math.log10(-Math.expm1(((partDb - totalDb) * Math.LN10) / 10));
}

/**
 * Grades of background correction. `engineering` is ISO 3744:2010, `survey` ISO 3746:2010, the two `position` grades
 * are grade 2 and 3 of ISO 11201/11202/11204:2010, `precision` is ISO 3745:2012 and ISO 3741:2010.
 */
export const BACKGROUND_GRADES = [
  "engineering",
  "survey",
  "engineering-position",
  "survey-position",
  "precision",
] as const;
export type BackgroundGrade = (typeof BACKGROUND_GRADES)[number];

interface GradeLimits {
  /** At or below this margin a correction is still made (precision: only below it). */
  upperDb: number;
  upperInside: boolean;
  /** Below this margin the correction is held and the result is an upper bound. */
  lowerDb: number;
}

/** Edges of the 250 Hz and 5 kHz one-third-octave bands, between which ISO 3745 asks for 10 dB instead of 6. */
const PRECISION_STRICT_FROM_HZ = 1000 * 10 ** (-13 / 20);
const PRECISION_STRICT_TO_HZ = 1000 * 10 ** (15 / 20);

/**
 * Margins between which the background correction is made, in dB.
 * Source: ISO 3744:2010 8.2.3, ISO 3746:2010 8.3.3, ISO 11201:2010, ISO 3745:2012 9.4.2.
 */
export function gradeLimits(grade: BackgroundGrade, frequencyHz?: number): GradeLimits {
  switch (grade) {
    case "engineering":
    case "engineering-position":
      return { upperDb: 15, upperInside: true, lowerDb: 6 };
    case "survey":
      return { upperDb: 10, upperInside: true, lowerDb: 3 };
    case "survey-position":
      return { upperDb: 15, upperInside: true, lowerDb: 3 };
    case "precision": {
      if (frequencyHz === undefined || !(frequencyHz > 0)) {
        throw new Refusal("frequency-missing", "The precision grade corrects band by band and needs the frequency.");
      }
      const strict = frequencyHz >= PRECISION_STRICT_FROM_HZ && frequencyHz <= PRECISION_STRICT_TO_HZ;
      return { upperDb: 15, upperInside: false, lowerDb: strict ? 10 : 6 };
    }
  }
}

export interface BackgroundInput {
  /** Level with the source running, dB. */
  measuredDb: number;
  /** Level with the source stopped, dB; -Infinity for none. */
  backgroundDb: number;
  grade: BackgroundGrade;
  /** Band centre in Hz; only the precision grade looks at it, and needs it. */
  frequencyHz?: number;
}

export interface BackgroundCorrection {
  /** K₁, 0 or more, dB. */
  k1Db: number;
  /** measuredDb − k1Db, dB. */
  correctedDb: number;
  /** True: the background was too near, K₁ is held at the grade's limit, and the true level is at or below correctedDb. */
  upperBound: boolean;
  /** measuredDb − backgroundDb rounded to 9 decimals, dB; may be negative; Infinity where there is no background. */
  marginDb: number;
}

/**
 * Background correction K₁ = −10 lg(1 − 10^(−ΔL/10)), in dB, with the limits of the grade.
 *
 * The margin ΔL is compared after rounding to 9 decimals, as 20.4 − 14.4 is not 6 in binary. Held values of K₁ are
 * unrounded (1.256 dB at 6 dB, 3.021 dB at 3 dB). Levels that are not finite are refused, but a background of
 * -Infinity (none) gives K₁ = 0. Not for peak levels, and not for tone-to-noise or prominence ratios.
 * Source: ISO 3744:2010 8.2.3 Eq. (16); ISO 3746:2010 8.3.3 Eq. (12); ISO 11201:2010; ISO 3745:2012 9.4.2 Eq. (11).
 */
export function backgroundCorrection(input: BackgroundInput): BackgroundCorrection {
  const { measuredDb, backgroundDb, grade, frequencyHz } = input;
  if (!Number.isFinite(measuredDb)) throw new Refusal("level-not-a-number", "The measured level is not a number.");
  checkLevels([backgroundDb]);
  const limits = gradeLimits(grade, frequencyHz);
  const exactDb = measuredDb - backgroundDb;
  const marginDb = exactDb === Infinity ? Infinity : Math.round(exactDb * 1e9) / 1e9;
  const clear = limits.upperInside ? marginDb > limits.upperDb : marginDb >= limits.upperDb;
  if (clear) return { k1Db: 0, correctedDb: measuredDb, upperBound: false, marginDb };
  const upperBound = marginDb < limits.lowerDb;
  const usedDb = upperBound ? limits.lowerDb : marginDb;
  const k1Db = -10 * Math.log10(-Math.expm1((-usedDb * Math.LN10) / 10));
  return { k1Db, correctedDb: measuredDb - k1Db, upperBound, marginDb };
}
