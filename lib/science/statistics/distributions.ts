import { logBeta } from "./special-functions";

const SQRT_TWO_PI = 2.5066282746310002;

/** Density of the standard normal distribution, dimensionless. exp(−z²/2) is split so that the tail keeps its digits. */
export function normalDensity(z: number): number {
  const coarse = Math.trunc(z * 16) / 16;
  return (Math.exp(-0.5 * coarse * coarse) * Math.exp(-0.5 * (z - coarse) * (z + coarse))) / SQRT_TWO_PI;
}

/** P(0 < Z < z) for z ≥ 0, all terms positive (Abramowitz and Stegun 26.2.11). */
function normalCentral(z: number): number {
  let term = z;
  let total = z;
  for (let n = 3; term > total * 1e-17; n += 2) {
    term *= (z * z) / n;
    total += term;
  }
  return total * normalDensity(z);
}

/** P(Z > z) for z ≥ 2.5 by Laplace's continued fraction (Abramowitz and Stegun 26.2.14), from the far end. */
function normalTail(z: number): number {
  let value = z;
  for (let n = Math.ceil(25 + 800 / (z * z)); n >= 1; n--) value = z + n / value;
  return normalDensity(z) / value;
}

/**
 * Standard normal distribution function Φ(z), 0..1, relative error below 1e-12 also in the lower tail.
 * NaN gives NaN. Abramowitz and Stegun, Handbook of Mathematical Functions, 26.2.
 */
export function normalCdf(z: number): number {
  if (Number.isNaN(z)) return Number.NaN;
  if (z < -38.5) return 0;
  if (z <= -2.5) return normalTail(-z);
  if (z < 0) return 0.5 - normalCentral(-z);
  if (z < 2.5) return 0.5 + normalCentral(z);
  return z > 38.5 ? 1 : 1 - normalTail(z);
}

/**
 * Quantile z of the standard normal distribution for a probability p in 0..1 (0 gives −∞, 1 gives +∞, outside NaN).
 * Start from Abramowitz and Stegun 26.2.23, then Newton's steps on Φ (centre) or ln Φ (tails).
 */
export function normalQuantile(p: number): number {
  if (!(p >= 0 && p <= 1)) return Number.NaN;
  if (p === 0 || p === 1) return p === 0 ? -Infinity : Infinity;
  if (p > 0.5) return -normalQuantile(1 - p);
  const t = Math.sqrt(-2 * Math.log(p));
  const share = 2.515517 + t * (0.802853 + t * 0.010328);
  let z = share / (1 + t * (1.432788 + t * (0.189269 + t * 0.001308))) - t;
  for (let n = 0; n < 8; n++) {
    const centre = p > 0.1;
    const cdf = normalCdf(z);
    const step = centre
      ? (0.5 - p - normalCentral(Math.abs(z)) * Math.sign(-z)) / normalDensity(z)
      : (Math.log(p / cdf) * cdf) / normalDensity(z);
    z += centre ? -step : step;
    if (Math.abs(step) <= 1e-16 * Math.abs(z)) break;
  }
  return z;
}

/** Density of Student's t with `dof` degrees of freedom (> 0, may be fractional or Infinity). */
export function studentTDensity(t: number, dof: number): number {
  if (dof === Infinity) return normalDensity(t);
  return Math.exp(-0.5 * (dof + 1) * Math.log1p((t * t) / dof) - logBeta(0.5 * dof, 0.5)) / Math.sqrt(dof);
}

/**
 * P(T > t) for t ≥ 2.5 as I_x(ν/2, 1/2)/2 with the hypergeometric function of DLMF 8.17.7 as Gauss's continued fraction
 * (DLMF 15.7.5): all its terms are positive, so no digits cancel, and for ν → ∞ it turns into Laplace's.
 */
function studentTail(t: number, dof: number): number {
  if (t === Infinity) return 0;
  const a = 0.5 * dof;
  const z = dof / (t * t);
  let value = 1;
  for (let n = Math.ceil(30 + 500 / (t * t)); n >= 0; n--) {
    const even = ((n + 1) * (a + n + 0.5) * z) / ((a + 2 * n + 1) * (a + 2 * n + 2));
    const odd = ((n + 0.5) * (n === 0 ? 1 : a + n) * z) / ((n === 0 ? 1 : a + 2 * n) * (a + 2 * n + 1));
    value = 1 + odd / (1 + even / value);
  }
  const front = Math.exp(-a * Math.log1p(1 / z) - logBeta(a, 0.5)) * Math.sqrt(1 + z);
  return front / (dof * value);
}

/** P(0 < T < t) for 0 ≤ t < 2.5 by the series of I_y(1/2, ν/2), all terms positive (DLMF 8.17.8). */
function studentCentral(t: number, dof: number): number {
  const a = 0.5 * dof;
  const y = (t * t) / (dof + t * t);
  let term = 1;
  let total = 1;
  for (let n = 0; term > total * 1e-17; n++) {
    term *= ((a + 0.5 + n) * y) / (n + 1.5);
    total += term;
  }
  return Math.sqrt(y) * Math.exp(-a * Math.log1p((t * t) / dof) - logBeta(a, 0.5)) * total;
}

/** P(T > t) for t ≥ 0. */
function studentUpper(t: number, dof: number): number {
  if (dof === Infinity) return normalCdf(-t);
  return t < 2.5 ? 0.5 - studentCentral(t, dof) : studentTail(t, dof);
}

/**
 * Student's t distribution function P(T ≤ t), 0..1, for `dof` > 0 (fractional dof as Welch–Satterthwaite gives them,
 * Infinity is the normal). NaN for dof ≤ 0 or NaN. DLMF 8.17; Abramowitz and Stegun 26.7.1.
 */
export function studentTCdf(t: number, dof: number): number {
  if (Number.isNaN(t) || !(dof > 0)) return Number.NaN;
  return t < 0 ? studentUpper(-t, dof) : 1 - studentUpper(t, dof);
}

/** Two-sided probability P(|T| ≥ |t|); keeps its digits far out. NaN for dof ≤ 0. */
export function studentTTwoSided(t: number, dof: number): number {
  if (Number.isNaN(t) || !(dof > 0)) return Number.NaN;
  return 2 * studentUpper(Math.abs(t), dof);
}

/**
 * Quantile t of Student's distribution: P(T ≤ t) = p, for p in 0..1 and dof > 0 (fractional or Infinity).
 * 0 gives −∞, 1 gives +∞, anything outside NaN. Both Newton iterations below are monotone, so they cannot overshoot
 * for good: the centre one on a concave mass from 0, the tail one on ln P(T > t), concave over ln t.
 */
export function studentTQuantile(p: number, dof: number): number {
  if (!(p >= 0 && p <= 1) || !(dof > 0)) return Number.NaN;
  if (dof === Infinity) return normalQuantile(p);
  if (p < 0.5) return -upperQuantile(p, 0.5 - p, dof);
  return upperQuantile(1 - p, p - 0.5, dof);
}

function upperQuantile(tail: number, central: number, dof: number): number {
  if (tail === 0) return Infinity;
  if (central === 0) return 0;
  if (tail > 0.25) {
    let t = 0;
    for (let n = 0; n < 60; n++) {
      const step = (central - studentCentral(t, dof)) / studentTDensity(t, dof);
      t += step;
      if (Math.abs(step) <= 1e-15 * t) break;
    }
    return t;
  }
  let logT = Math.log(-normalQuantile(tail));
  for (let n = 0; n < 200; n++) {
    const t = Math.exp(logT);
    const q = studentUpper(t, dof);
    const step = (Math.log(q / tail) * q) / (t * studentTDensity(t, dof));
    logT += step;
    if (Math.abs(step) <= 1e-16 * Math.max(1, Math.abs(logT))) break;
  }
  return Math.exp(logT);
}
