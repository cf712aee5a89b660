import { at } from "../statistics/descriptive";

/** y = final·(1 − e^(−t/τ)), with standard errors of the linearised model. */
export interface RiseFit {
  readonly final: number;
  readonly tau: number;
  readonly seFinal: number;
  readonly seTau: number;
  readonly rss: number;
}

/** Sums for one τ: the one linear term solved exactly, and the 2×2 of the derivative columns. */
function sums(times: ArrayLike<number>, values: ArrayLike<number>, tau: number) {
  let [sbb, sby] = [0, 0];
  for (let i = 0; i < times.length; i++) {
    const b = -Math.expm1(-at(times, i) / tau);
    sbb += b * b;
    sby += b * at(values, i);
  }
  const final = sby / sbb;
  let [sbd, sdd, sdr, rss] = [0, 0, 0, 0];
  for (let i = 0; i < times.length; i++) {
    const t = at(times, i);
    const b = -Math.expm1(-t / tau);
    const d = (-final * t * Math.exp(-t / tau)) / (tau * tau);
    const rest = at(values, i) - final * b;
    sbd += b * d;
    sdd += d * d;
    sdr += d * rest;
    rss += rest * rest;
  }
  return { final, sbb, sbd, sdd, sdr, rss };
}

/**
 * Rise from 0 at t = 0 (heat on) by variable projection: grid and Gauss–Newton on ln τ, held where the residual falls.
 * Times from heat on, > 0, in s; values in K. Undefined for fewer than three samples or times that reach no length.
 */
export function fitRiseFromZero(times: ArrayLike<number>, values: ArrayLike<number>): RiseFit | undefined {
  const n = times.length;
  const record = n === 0 ? 0 : at(times, n - 1);
  if (n < 3 || values.length !== n || !(record > 0)) return undefined;
  let tau = record;
  let least = Infinity;
  for (let k = 0; k <= 400; k++) {
    const candidate = (record / 1000) * 10 ** (k / 80);
    const { rss } = sums(times, values, candidate);
    if (rss < least) [tau, least] = [candidate, rss];
  }
  for (let n = 0; n < 60; n++) {
    const s = sums(times, values, tau);
    let step = (s.sbb * s.sdr) / (s.sbb * s.sdd - s.sbd * s.sbd);
    while (Math.abs(step) > 1e-15 * tau && !(sums(times, values, tau + step).rss <= s.rss)) step /= 2;
    if (!(Math.abs(step) > 1e-14 * tau)) break;
    tau += step;
  }
  const s = sums(times, values, tau);
  const variance = s.rss / (n - 2);
  const determinant = s.sbb * s.sdd - s.sbd * s.sbd;
  return {
    final: s.final,
    tau,
    seFinal: Math.sqrt((variance * s.sdd) / determinant),
    seTau: Math.sqrt((variance * s.sbb) / determinant),
    rss: s.rss,
  };
}
