import { at, mean } from "./descriptive";

/** Straight line y = intercept + slope·x by least squares, with what it leaves open. */
export interface LineFit {
  readonly n: number;
  readonly intercept: number;
  readonly slope: number;
  /** Standard errors in the units of intercept and slope. */
  readonly seIntercept: number;
  readonly seSlope: number;
  /** Correlation of intercept and slope, −1..1. */
  readonly correlation: number;
  /** Residual standard deviation with n − 2, unit of y; NaN for two points. */
  readonly residualSd: number;
  readonly xMean: number;
  /** Σ(x − x̄)², square of the unit of x. */
  readonly sxx: number;
}

/**
 * Least-squares line (JCGM 100:2008, H.3.3), computed about the means. Undefined for fewer than two points, or when
 * all x are one. @throws RangeError when x and y differ in length.
 */
export function fitLine(x: ArrayLike<number>, y: ArrayLike<number>): LineFit | undefined {
  if (x.length !== y.length) throw new RangeError("x and y differ in length");
  const n = x.length;
  const xMean = mean(x);
  const yMean = mean(y);
  if (xMean === undefined || yMean === undefined || n < 2) return undefined;
  let [sxx, sxy] = [0, 0];
  for (let i = 0; i < n; i++) {
    const dx = at(x, i) - xMean;
    sxx += dx * dx;
    sxy += dx * (at(y, i) - yMean);
  }
  if (!(sxx > 0)) return undefined;
  const slope = sxy / sxx;
  let rss = 0;
  for (let i = 0; i < n; i++) rss += (at(y, i) - yMean - slope * (at(x, i) - xMean)) ** 2;
  const residualSd = n > 2 ? Math.sqrt(rss / (n - 2)) : Number.NaN;
  const share = Math.sqrt(1 / n + (xMean * xMean) / sxx);
  return {
    n,
    intercept: yMean - slope * xMean,
    slope,
    seIntercept: residualSd * share,
    seSlope: residualSd / Math.sqrt(sxx),
    correlation: -xMean / Math.sqrt(sxx) / share,
    residualSd,
    xMean,
    sxx,
  };
}

/** The line's value at x with its standard uncertainty (JCGM 100:2008, H.3.4), unit of y. */
export function predictLine(fit: LineFit, x: number): { value: number; u: number } {
  const u = fit.residualSd * Math.sqrt(1 / fit.n + (x - fit.xMean) ** 2 / fit.sxx);
  return { value: fit.intercept + fit.slope * x, u };
}

/** Slope's standard error for a known scatter: s_b = σ/√Sxx, unit of σ over unit of x. */
export function seOfSlope(sigma: number, sxx: number): number {
  return sigma / Math.sqrt(sxx);
}
