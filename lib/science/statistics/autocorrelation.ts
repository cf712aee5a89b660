import { at, mean, squaredDeviations } from "./descriptive";

/** Lag-1 autocorrelation about the mean, −1..1; undefined for fewer than three values or no spread at all. */
export function lagOneCorrelation(values: ArrayLike<number>): number | undefined {
  const centre = mean(values);
  const squares = squaredDeviations(values);
  if (values.length < 3 || centre === undefined || squares === undefined || !(squares > 0)) return undefined;
  let products = 0;
  for (let i = 1; i < values.length; i++) products += (at(values, i) - centre) * (at(values, i - 1) - centre);
  return products / squares;
}

/**
 * Effective number of independent values in n readings of lag-1 correlation r₁: n(1 − r₁)/(1 + r₁) (first-order
 * autoregressive noise; G. V. Bayley, J. M. Hammersley, Suppl. J. R. Stat. Soc. 8 (1946) 184; value from memory).
 * Held between 1 and n: a negative r₁ is not taken as a gain.
 */
export function effectiveSampleSize(n: number, lagOne: number): number {
  return Math.min(n, Math.max(1, (n * (1 - lagOne)) / (1 + lagOne)));
}

/**
 * Von Neumann's ratio over a window: η = d²/s² (about 2 for white noise, towards 0 on a trend) and R_w = s²/(d²/2)
 * (J. von Neumann, Ann. Math. Stat. 12 (1941) 367; citation from memory). Undefined for fewer than three values,
 * no spread, or no change from one to the next.
 */
export function vonNeumann(values: ArrayLike<number>): { eta: number; ratio: number } | undefined {
  const squares = squaredDeviations(values);
  if (values.length < 3 || squares === undefined || !(squares > 0)) return undefined;
  let steps = 0;
  for (let i = 1; i < values.length; i++) steps += (at(values, i) - at(values, i - 1)) ** 2;
  return steps > 0 ? { eta: steps / squares, ratio: (2 * squares) / steps } : undefined;
}
