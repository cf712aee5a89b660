import { at } from "../statistics/descriptive";

/** y = final − amplitude·e^(−t/τ); t from the first sample. Standard errors from the linearised model. */
export interface ExponentialFit {
  readonly final: number;
  readonly amplitude: number;
  readonly tau: number;
  readonly seFinal: number;
  readonly seAmplitude: number;
  readonly seTau: number;
  /** Residual sum of squares, and its standard deviation with n − 3. */
  readonly rss: number;
  readonly residualSd: number;
  /** True when the best τ lies at the edge of the range searched: then it isn't known. */
  readonly atEdge: boolean;
}

/**
 * Exponential approach by variable projection: for each τ the two linear terms are solved exactly, and ln τ is searched
 * on a grid and then by golden section, so it cannot diverge (G. H. Golub, V. Pereyra, SIAM J. Numer. Anal. 10 (1973)
 * 413). Times in s ascending, values in K or °C. τ from twice the mean interval to ten times the record. Undefined for
 * fewer than four samples or a record without length.
 */
export function fitExponential(times: ArrayLike<number>, values: ArrayLike<number>): ExponentialFit | undefined {
  const n = times.length;
  if (n < 4 || values.length !== n) return undefined;
  const start = at(times, 0);
  const record = at(times, n - 1) - start;
  if (!(record > 0)) return undefined;
  const low = Math.log((2 * record) / (n - 1));
  const high = Math.log(10 * record);
  const rssAt = (logTau: number) => project(times, values, start, Math.exp(logTau)).rss;
  const grid = 48;
  let best = 0;
  let least = Infinity;
  for (let k = 0; k <= grid; k++) {
    const rss = rssAt(low + ((high - low) * k) / grid);
    if (rss < least) [best, least] = [k, rss];
  }
  const width = (high - low) / grid;
  const coarse = golden(rssAt, low + Math.max(0, best - 1) * width, low + Math.min(grid, best + 1) * width);
  const tau = polish(times, values, start, Math.exp(coarse));
  const atEdge = coarse - low < width * 1e-3 || high - coarse < width * 1e-3;
  return withErrors(times, values, start, tau, atEdge);
}

export interface Projected {
  final: number;
  amplitude: number;
  rss: number;
}

/** Best final value and amplitude for one τ, with the residual sum of squares; times count from `start`. */
export function project(times: ArrayLike<number>, values: ArrayLike<number>, start: number, tau: number): Projected {
  const n = times.length;
  let eMean = 0;
  let yMean = 0;
  for (let i = 0; i < n; i++) {
    eMean += Math.exp(-(at(times, i) - start) / tau) / n;
    yMean += at(values, i) / n;
  }
  let see = 0;
  let sey = 0;
  let syy = 0;
  for (let i = 0; i < n; i++) {
    const e = Math.exp(-(at(times, i) - start) / tau) - eMean;
    const y = at(values, i) - yMean;
    see += e * e;
    sey += e * y;
    syy += y * y;
  }
  const amplitude = see > 0 ? -sey / see : 0;
  return { final: yMean + amplitude * eMean, amplitude, rss: Math.max(0, syy + amplitude * sey) };
}

function golden(f: (x: number) => number, from: number, to: number): number {
  const share = (Math.sqrt(5) - 1) / 2;
  let [a, b] = [from, to];
  let [x1, x2] = [b - share * (b - a), a + share * (b - a)];
  let [f1, f2] = [f(x1), f(x2)];
  for (let n = 0; n < 40 && b - a > 1e-7; n++) {
    if (f1 <= f2) {
      [b, x2, f2] = [x2, x1, f1];
      x1 = b - share * (b - a);
      f1 = f(x1);
    } else {
      [a, x1, f1] = [x1, x2, f2];
      x2 = a + share * (b - a);
      f2 = f(x2);
    }
  }
  return (a + b) / 2;
}

/** Sums of the three derivative columns (1, −e, −A·t·e/τ²) and of the residual along them. */
function normalSums(times: ArrayLike<number>, values: ArrayLike<number>, start: number, p: Projected, tau: number) {
  const m = [0, 0, 0, 0, 0, 0];
  let gradient = [0, 0, 0];
  let rss = 0;
  for (let i = 0; i < times.length; i++) {
    const t = at(times, i) - start;
    const e = Math.exp(-t / tau);
    const row = [1, -e, (-p.amplitude * t * e) / (tau * tau)] as const;
    const rest = at(values, i) - (p.final - p.amplitude * e);
    rss += rest * rest;
    gradient = gradient.map((g, k) => g + (row[k] ?? 0) * rest);
    m[0] = at(m, 0) + 1;
    m[1] = at(m, 1) + row[1];
    m[2] = at(m, 2) + row[2];
    m[3] = at(m, 3) + row[1] * row[1];
    m[4] = at(m, 4) + row[1] * row[2];
    m[5] = at(m, 5) + row[2] * row[2];
  }
  return { m, gradient, rss };
}

/** Inverse of the symmetric 3×3 of the sums, as [11, 12, 13, 22, 23, 33]; undefined when singular. */
function invert(m: readonly number[]): number[] | undefined {
  const [a = 0, b = 0, c = 0, d = 0, e = 0, f = 0] = m;
  const cofactors = [d * f - e * e, c * e - b * f, b * e - c * d, a * f - c * c, b * c - a * e, a * d - b * b];
  const determinant = a * at(cofactors, 0) + b * at(cofactors, 1) + c * at(cofactors, 2);
  return determinant > 0 ? cofactors.map((value) => value / determinant) : undefined;
}

/** A few Gauss–Newton steps on τ from the searched value; a step that doesn't lower the residual ends it. */
function polish(times: ArrayLike<number>, values: ArrayLike<number>, start: number, from: number): number {
  let tau = from;
  for (let n = 0; n < 6; n++) {
    const p = project(times, values, start, tau);
    const { m, gradient } = normalSums(times, values, start, p, tau);
    const inverse = invert(m);
    if (!inverse) break;
    const step = at(inverse, 2) * at(gradient, 0) + at(inverse, 4) * at(gradient, 1) + at(inverse, 5) * at(gradient, 2);
    const next = tau + step;
    if (!(Math.abs(step) < 0.01 * tau) || project(times, values, start, next).rss > p.rss * (1 + 1e-9)) break;
    tau = next;
    if (Math.abs(step) < 1e-13 * tau) break;
  }
  return tau;
}

function withErrors(times: ArrayLike<number>, values: ArrayLike<number>, start: number, tau: number, atEdge: boolean) {
  const p = project(times, values, start, tau);
  const { m, rss } = normalSums(times, values, start, p, tau);
  const variance = times.length > 3 ? rss / (times.length - 3) : Number.NaN;
  const inverse = invert(m);
  const se = (index: number) => (inverse ? Math.sqrt(Math.max(0, at(inverse, index)) * variance) : Number.NaN);
  return {
    final: p.final,
    amplitude: p.amplitude,
    tau,
    seFinal: se(0),
    seAmplitude: se(3),
    seTau: se(5),
    rss,
    residualSd: Math.sqrt(variance),
    atEdge,
  };
}

/**
 * Final value and τ from three values one interval apart: (T1·T3 − T2²)/(T1 + T3 − 2·T2). Undefined unless the steps
 * shrink in one direction. Ill-conditioned when the second difference is near the noise (value from memory).
 */
export function threePointFinal(values: readonly [number, number, number], intervalS: number) {
  const [t1, t2, t3] = values;
  const shrink = (t3 - t2) / (t2 - t1);
  if (!(shrink > 0 && shrink < 1)) return undefined;
  return { final: (t1 * t3 - t2 * t2) / (t1 + t3 - 2 * t2), tau: -intervalS / Math.log(shrink) };
}
