import { at } from "../statistics/descriptive";

/** Filter weights λ1 (value), λ2 (variance about the filter), λ3 (variance of steps). */
export interface RWeights {
  readonly value: number;
  readonly variance: number;
  readonly step: number;
}

export const USUAL_WEIGHTS: RWeights = { value: 0.2, variance: 0.1, step: 0.1 };

/**
 * 99 % point of R on white noise with the usual weights, computed from 10^6 draws (two generators, agreeing to 0.004):
 * the published tables of Cao and Rhinehart (J. Process Control 7 (1997) 149) were not seen.
 */
export const R_LIMIT_99 = 1.73;

/**
 * Ratio of two variance estimates, one a sample: near 1 in a steady state, large on the move, (2 − λ1)/λ1² on a ramp
 * without noise. S. Cao, R. R. Rhinehart, J. Process Control 5 (1995) 363. Starts with the filter at the first value
 * and both variances 0, so R[1] is 2 − λ1; R[0] and every R without any step yet are NaN ("undetermined", never ∞).
 */
export function varianceRatio(values: ArrayLike<number>, weights: RWeights = USUAL_WEIGHTS): Float64Array {
  const ratios = new Float64Array(values.length).fill(Number.NaN);
  if (values.length === 0) return ratios;
  let filtered = at(values, 0);
  let last = filtered;
  let variance = 0;
  let steps = 0;
  for (let i = 1; i < values.length; i++) {
    const x = at(values, i);
    variance = weights.variance * (x - filtered) ** 2 + (1 - weights.variance) * variance;
    filtered = weights.value * x + (1 - weights.value) * filtered;
    steps = weights.step * (x - last) ** 2 + (1 - weights.step) * steps;
    last = x;
    if (steps > 0) ratios[i] = ((2 - weights.value) * variance) / steps;
  }
  return ratios;
}

/** First index at which R has been below the limit for `run` samples in a row; undefined if never. */
export function firstQuietRun(ratios: ArrayLike<number>, limit: number, run: number): number | undefined {
  let quiet = 0;
  for (let i = 0; i < ratios.length; i++) {
    quiet = at(ratios, i) < limit ? quiet + 1 : 0;
    if (quiet === run) return i;
  }
  return undefined;
}
