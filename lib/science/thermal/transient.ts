import { at } from "../statistics/descriptive";
import { fitExponential, project, type ExponentialFit } from "./exponential-fit";

/** The approach found in a record; fit times count from `startS`. */
export interface Transient {
  readonly fit: ExponentialFit;
  readonly startS: number;
}

const POINTS_MAX = 1500;
const SAMPLES_MIN = 10;
const STARTS = 14;
const SHARE_OF_START = 0.05;
/** House rules, no source: how much of the noise may be left, and how far a swing must stand out of it. */
const NOISE_OPEN = 1.25;
const SWING_MIN = 5;

/** Means of blocks of equal count: leaves final value and τ of an exponential unchanged and the sums short. */
export function blockMeans(times: Float64Array, values: Float64Array, pointsMax = POINTS_MAX) {
  const size = Math.ceil(times.length / pointsMax);
  if (size <= 1) return { times, values };
  const count = Math.floor(times.length / size);
  const average = (from: Float64Array) =>
    Float64Array.from({ length: count }, (_, block) => {
      let total = 0;
      for (let i = block * size; i < (block + 1) * size; i++) total += at(from, i);
      return total / size;
    });
  return { times: average(times), values: average(values) };
}

/**
 * Exponential approach of a ΔT record (s, K), or undefined when none stands out: no swing of five times the noise, or
 * τ beyond what the record can tell. Where the whole record is too long to show it, its first quarter, sixteenth … are
 * tried, and the final value is then fitted to the whole record with that τ.
 */
export function findTransient(times: Float64Array, values: Float64Array): Transient | undefined {
  for (let n = times.length; n >= SAMPLES_MIN; n = Math.floor(n / 4)) {
    const found = approachIn(times.subarray(0, n), values.subarray(0, n));
    if (!found) continue;
    if (n === times.length) return found;
    const whole = blockMeans(times, values);
    const { final } = project(whole.times, whole.values, found.startS, found.fit.tau);
    return { fit: { ...found.fit, final }, startS: found.startS };
  }
  return undefined;
}

/**
 * The fit begins as early as its residual stays within 1.25 times the smallest one reached by later starts, so a first
 * stretch with the heat off or a quick first time constant is left out.
 */
function approachIn(times: Float64Array, values: Float64Array): Transient | undefined {
  const short = blockMeans(times, values);
  const n = short.times.length;
  const fits: { fit: ExponentialFit; from: number }[] = [];
  for (let k = 0; k < STARTS; k++) {
    const from = Math.floor(n * SHARE_OF_START * k);
    if (n - from < 20 && k > 0) break;
    const fit = fitExponential(short.times.subarray(from), short.values.subarray(from));
    if (fit) fits.push({ fit, from });
  }
  const range = Math.max(...short.values) - Math.min(...short.values);
  const smallest = Math.min(...fits.map(({ fit }) => fit.residualSd));
  const chosen = fits.find(({ fit }) => fit.residualSd <= NOISE_OPEN * smallest + 1e-7 * range);
  if (!chosen) return undefined;
  const { fit, from } = chosen;
  const startS = at(short.times, from);
  const swing = Math.abs(fit.amplitude) * -Math.expm1(-(at(short.times, n - 1) - startS) / fit.tau);
  const tauKnown = !fit.atEdge && fit.seTau < fit.tau;
  return tauKnown && swing > SWING_MIN * fit.residualSd && swing > 0 ? { fit, startS } : undefined;
}
