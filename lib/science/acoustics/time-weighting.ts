import { energyMean } from "./levels";

/** Time constants in s: fast 0.125, slow 1. Source: IEC 61672-1:2013 5.8. */
export const TIME_CONSTANT_S = { F: 0.125, S: 1 } as const;
export type TimeWeighting = keyof typeof TIME_CONSTANT_S;

/** Coefficient of the one-pole average of the square, 1 − exp(−1/(f_s·τ)). Source: IEC 61672-1:2013 5.8. */
export function onePoleCoefficient(sampleRateHz: number, timeConstantS: number): number {
  return -Math.expm1(-1 / (sampleRateHz * timeConstantS));
}

/** Exponentially weighted mean square of samples, same length, in the unit squared. Starts from 0. */
export function exponentialMeanSquare(
  samples: Float64Array,
  sampleRateHz: number,
  weighting: TimeWeighting,
): Float64Array {
  const alpha = onePoleCoefficient(sampleRateHz, TIME_CONSTANT_S[weighting]);
  let value = 0;
  return samples.map((sample) => (value += alpha * (sample * sample - value)));
}

/** Response in dB, a time after a steady tone begins, under its final value: 10 lg(1 − e^(−t/τ)). */
export function stepResponseDb(timeS: number, timeConstantS: number): number {
  return 10 * Math.log10(-Math.expm1(-timeS / timeConstantS));
}

/** Greatest reading of a tone burst in dB under the steady tone's. Source: IEC 61672-1:2013 5.9 Eq. (7). */
export function toneBurstDb(durationS: number, weighting: TimeWeighting): number {
  return stepResponseDb(durationS, TIME_CONSTANT_S[weighting]);
}

/** Sound exposure level of a tone burst in dB under the steady tone's level. Source: IEC 61672-1:2013 5.9 Eq. (8). */
export function toneBurstExposureDb(durationS: number): number {
  return 10 * Math.log10(durationS);
}

/** Rate of decay in dB/s once a sound stops: 10 lg(e)/τ. Source: IEC 61672-1:2013 5.8.2. */
export function decayRateDbPerS(weighting: TimeWeighting): number {
  return (10 * Math.LOG10E) / TIME_CONSTANT_S[weighting];
}

/** Equivalent level in dB of short levels of equal duration; undefined for none. Source: definition, ISO 1996-1. */
export function equivalentLevelDb(levelsDb: readonly number[]): number | undefined {
  return energyMean(levelsDb);
}

/** Sound exposure level in dB from an equivalent level and its duration in s. Source: definition, ISO 1996-1. */
export function exposureLevelDb(equivalentDb: number, durationS: number): number {
  return equivalentDb + 10 * Math.log10(durationS);
}
