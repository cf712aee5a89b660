import { at, mean, sampleSd } from "./descriptive";
import { normalCdf, normalQuantile } from "./distributions";

/** Fewest values for a bootstrap interval: three have only ten different resamples (house rule). */
export const BOOTSTRAP_MIN = 8;
const ENUMERATE_MAX = 1e6;

/** A statistic over every resample with replacement, n^n of them, in no order. @throws RangeError beyond a million. */
export function everyResample(
  values: readonly number[],
  statistic: (sample: readonly number[]) => number,
): Float64Array {
  const n = values.length;
  if (n === 0 || n ** n > ENUMERATE_MAX) throw new RangeError("too many resamples to go through");
  return Float64Array.from({ length: n ** n }, (_, code) => {
    let rest = code;
    return statistic(
      values.map(() => {
        const drawn = at(values, rest % n);
        rest = Math.floor(rest / n);
        return drawn;
      }),
    );
  });
}

/** Smallest value whose cumulated share reaches p (quantile definition 1 of Hyndman and Fan); the list ascending. */
export function quantileByCount(sorted: ArrayLike<number>, p: number): number {
  return at(sorted, Math.min(sorted.length, Math.max(1, Math.ceil(p * sorted.length - 1e-9))) - 1);
}

/**
 * Levels of the bias-corrected and accelerated bootstrap (B. Efron, J. Am. Stat. Assoc. 82 (1987) 171): z0 from the share
 * of resamples strictly below the sample's value, a from the jackknife.
 */
export function bcaLevels(
  resampled: ArrayLike<number>,
  values: readonly number[],
  statistic: (sample: readonly number[]) => number,
) {
  const own = statistic(values);
  let [below, equal] = [0, 0];
  for (let i = 0; i < resampled.length; i++) {
    const difference = at(resampled, i) - own;
    if (Math.abs(difference) <= 1e-12 * Math.max(1, Math.abs(own))) equal++;
    else if (difference < 0) below++;
  }
  const z0 = normalQuantile(below / resampled.length);
  const left = values.map((_, i) => statistic(values.toSpliced(i, 1)));
  const centre = mean(left) ?? Number.NaN;
  const [cubes, squares] = [3, 2].map((power) => left.reduce((total, v) => total + (centre - v) ** power, 0));
  const a = (cubes ?? 0) / (6 * (squares ?? 0) ** 1.5) || 0;
  const level = (p: number) => {
    const z = z0 + normalQuantile(p);
    return normalCdf(z0 + z / (1 - a * z));
  };
  return { below, equal, z0, a, levels: [level(0.025), level(0.975)] as const };
}

/**
 * Difference of two group means against every division of all values: two-sided p by |difference| ≥ |observed|, the
 * observed one among them. @throws RangeError beyond a million divisions. Undefined for an empty group.
 */
export function permuteGroups(x: readonly number[], y: readonly number[]) {
  const all = [...x, ...y];
  if (x.length === 0 || y.length === 0) return undefined;
  const whole = all.reduce((total, v) => total + v, 0);
  const differenceOf = (sum: number) => sum / x.length - (whole - sum) / y.length;
  const observed = differenceOf(x.reduce((total, v) => total + v, 0));
  const close = 1e-9 * Math.max(1, Math.abs(observed));
  let [total, reached, lower] = [0, 0, 0];
  const walk = (from: number, left: number, sum: number): void => {
    if (left === 0) {
      if (++total > ENUMERATE_MAX) throw new RangeError("too many divisions to go through");
      const difference = differenceOf(sum);
      if (Math.abs(difference) >= Math.abs(observed) - close) reached++;
      if (difference <= observed + close) lower++;
      return;
    }
    for (let i = from; i <= all.length - left; i++) walk(i + 1, left - 1, sum + at(all, i));
  };
  walk(0, x.length, 0);
  return { observed, total, reached, lower, p: reached / total };
}

/**
 * Matched pairs against every flip of signs: two-sided p by |sum| ≥ |observed| over 2^n flips. Undefined for none.
 * @throws RangeError beyond twenty pairs.
 */
export function flipSigns(differences: readonly number[]) {
  const n = differences.length;
  if (n === 0) return undefined;
  if (n > 20) throw new RangeError("too many flips to go through");
  const observed = differences.reduce((total, d) => total + d, 0);
  const close = 1e-9 * Math.max(1, Math.abs(observed));
  let [reachedAbove, beyondAbove, reached] = [0, 0, 0];
  for (let code = 0; code < 2 ** n; code++) {
    const sum = differences.reduce((total, d, i) => total + (code & (1 << i) ? -d : d), 0);
    if (sum >= observed - close) reachedAbove++;
    if (sum > observed + close) beyondAbove++;
    if (Math.abs(sum) >= Math.abs(observed) - close) reached++;
  }
  return { sum: observed, reachedAbove, beyondAbove, reached, total: 2 ** n, p: reached / 2 ** n };
}

/** Standard deviation of a full list of resamples (with n, not n − 1), unit of the statistic. */
export function spreadOf(resampled: ArrayLike<number>): number {
  return (sampleSd(resampled) ?? Number.NaN) * Math.sqrt((resampled.length - 1) / resampled.length);
}
