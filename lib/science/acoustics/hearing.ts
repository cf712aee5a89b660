import { energySum } from "./levels";

/** Recommended exposure limit, dB(A) over 8 h, and ceiling, dB(A). Source: NIOSH publication 98-126 (1998). */
export const NIOSH_LIMIT_DBA = 85;
export const NIOSH_CEILING_DBA = 140;

/**
 * Time in minutes after which the recommended daily dose is reached at a level, with a 3 dB exchange rate.
 * In: level at the ear, dB(A), 80 to 140. Source: NIOSH 98-126 (1998), T = 480/2^((L−85)/3).
 */
export function nioshMinutes(levelDba: number): number {
  return 480 / 2 ** ((levelDba - NIOSH_LIMIT_DBA) / 3);
}

export interface ExposurePart {
  minutes: number;
  /** Level at the ear, dB(A). */
  levelDba: number;
}

/** Daily dose in per cent and 8 h average in dB(A); the average is undefined without exposure. Source: NIOSH 98-126. */
export function nioshDose(parts: readonly ExposurePart[]): { dosePercent: number; averageDba: number | undefined } {
  const share = parts.reduce((sum, part) => sum + part.minutes / nioshMinutes(part.levelDba), 0);
  const dosePercent = 100 * share;
  return { dosePercent, averageDba: share > 0 ? 10 * Math.log10(share) + NIOSH_LIMIT_DBA : undefined };
}

/**
 * Daily exposure level L_EX,8h in dB(A): 10 lg Σ (T/8 h)·10^(L/10). Undefined without exposure.
 * Source: ISO 9612:2009 Eq. (8) to (10).
 */
export function dailyExposureDba(parts: readonly ExposurePart[]): number | undefined {
  return energySum(
    parts
      .filter(({ minutes }) => minutes > 0)
      .map(({ minutes, levelDba }) => levelDba + 10 * Math.log10(minutes / 480)),
  );
}

/**
 * Which values of the directive a daily exposure reaches. Action values count when reached, the limit when exceeded;
 * compared unrounded. Source: Directive 2003/10/EC Article 3.
 */
export function exposureActions(dailyDba: number): { lowerAction: boolean; upperAction: boolean; limit: boolean } {
  return { lowerAction: dailyDba >= 80, upperAction: dailyDba >= 85, limit: dailyDba > 87 };
}

/** Peak sound pressure in Pa as a level in dB re 20 µPa. Source: definition. */
export function peakPressureDb(pressurePa: number): number {
  return 20 * Math.log10(pressurePa / 20e-6);
}

export type HearingNotice = "none" | "notice" | "protect";

/**
 * What to say beside a level that somebody works at: from 80 dB(A) a notice, from 85 dB(A) hearing protection and a
 * time limit. A level read close to the fan is not the level at the ear, so this is a caution and no verdict.
 * Source: Directive 2003/10/EC Article 3 (lower and upper action values).
 */
export function hearingNotice(levelDba: number): HearingNotice {
  if (levelDba >= 85) return "protect";
  return levelDba >= 80 ? "notice" : "none";
}
