import { studentTQuantile } from "./distributions";
import { at, mean, sampleSd } from "./descriptive";

/** Expected range of two normal values over σ: 2/√π. Tables print 1.128, NIST's worked example uses that. */
export const D2_EXACT = 2 / Math.sqrt(Math.PI);
export const D2_PRINTED = 1.128;

/** Constants of a moving range of two: d2, d3, E2 = 3/d2, D4 = 1 + 3·d3/d2, D3 = 0 (NIST/SEMATECH e-Handbook 6.3.2). */
export function movingRangeConstants() {
  const d3 = Math.sqrt(2 - 4 / Math.PI);
  return { d2: D2_EXACT, d3, e2: 3 / D2_EXACT, d4: 1 + (3 * d3) / D2_EXACT, dLower: 0 };
}

/** Centre and limits of a chart, in the unit of its values. */
export interface ChartLimits {
  readonly centre: number;
  readonly sigma: number;
  readonly lower: number;
  readonly upper: number;
}

/**
 * Individuals and moving ranges (NIST/SEMATECH e-Handbook 6.3.2.2): σ = mean moving range ÷ d2, limits ± 3σ, upper limit
 * of a range D4 × mean range. Undefined for fewer than two values.
 * @param d2 left out: exact; 1.128 repeats printed examples
 */
export function individualsChart(values: ArrayLike<number>, d2: number = D2_EXACT) {
  const centre = mean(values);
  if (centre === undefined || values.length < 2) return undefined;
  const ranges = new Float64Array(values.length - 1);
  for (let i = 0; i < ranges.length; i++) ranges[i] = Math.abs(at(values, i + 1) - at(values, i));
  const rangeMean = mean(ranges) ?? Number.NaN;
  const sigma = rangeMean / d2;
  const limits: ChartLimits = { centre, sigma, lower: centre - 3 * sigma, upper: centre + 3 * sigma };
  return { ...limits, ranges, rangeMean, rangeUpper: movingRangeConstants().d4 * rangeMean };
}

/**
 * Exponentially weighted moving average z_i = λx_i + (1 − λ)z_{i−1}, z_0 = target (NIST/SEMATECH e-Handbook 6.3.2.4);
 * n + 1 values with z_0 first. λ in 0..1.
 */
export function ewma(values: ArrayLike<number>, lambda: number, target: number): Float64Array {
  const averages = new Float64Array(values.length + 1);
  averages[0] = target;
  for (let i = 0; i < values.length; i++) averages[i + 1] = lambda * at(values, i) + (1 - lambda) * at(averages, i);
  return averages;
}

/** EWMA limits target ± L·s·√(λ/(2 − λ)·(1 − (1 − λ)^2i)); without i the steady ones. Unit of the values. */
export function ewmaLimits(target: number, s: number, lambda: number, width: number, i = Infinity) {
  const grown = i === Infinity ? 1 : 1 - (1 - lambda) ** (2 * i);
  const half = width * s * Math.sqrt((lambda / (2 - lambda)) * grown);
  return { lower: target - half, upper: target + half };
}

/**
 * Interval in which the next value falls with 95 %: x̄ ± t·s·√(1 + 1/n), n − 1 degrees of freedom; the "trial" limits
 * while values are few. Undefined for fewer than two.
 */
export function predictionLimits(values: ArrayLike<number>) {
  const centre = mean(values);
  const s = sampleSd(values);
  if (centre === undefined || s === undefined) return undefined;
  const half = studentTQuantile(0.975, values.length - 1) * s * Math.sqrt(1 + 1 / values.length);
  return { centre, s, half, lower: centre - half, upper: centre + half };
}
