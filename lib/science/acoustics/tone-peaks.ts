import { criticalBand } from "./ecma-tones";
import type { Spectrum } from "./welch";

/** A peak stands this factor (6 dB) above the median line of its critical band, or more where lines are few and ragged. */
const PEAK_FACTOR = 10 ** 0.6;
/** A valley so far (10 dB) under the line behind it parts two tones. */
const VALLEY_FACTOR = 10;
/** Odds against chance, as a natural logarithm, that a line of plain noise passes for a peak: one in a million. */
const CHANCE = 13.8;
/** Peaks are looked for from here up, Hz: below it room and mains drown a fan. */
const SEARCH_FROM_HZ = 38;

/** A line this far (200 dB) under the sum of all is the arithmetic's own rounding: no recording reaches so deep. */
const ROUNDING_SHARE = 1e-20;

/**
 * Factor over the mean that a line of plain noise, averaged over `blocks` blocks, passes once in a million:
 * blocks·(t − 1 − ln t) = 13.8 (Chernoff bound of the gamma distribution), at least 6 dB.
 */
export function peakFactor(blocks: number): number {
  let low = PEAK_FACTOR;
  if (blocks * (low - 1 - Math.log(low)) >= CHANCE) return low;
  let high = 40;
  for (let i = 0; i < 50; i += 1) {
    const middle = (low + high) / 2;
    if (blocks * (middle - 1 - Math.log(middle)) >= CHANCE) high = middle;
    else low = middle;
  }
  return high;
}

/** Median line of the critical band about each line, unit squared per Hz; taken on a grid and held between. */
export function noiseFloor({ psd, spacingHz }: Spectrum): Float64Array {
  const floor = new Float64Array(psd.length);
  const topHz = (psd.length - 1) * spacingHz;
  let from = 0;
  let centreHz = 30;
  while (from < psd.length) {
    const { widthHz } = criticalBand(centreHz);
    const first = Math.max(2, Math.round((centreHz - widthHz / 2) / spacingHz));
    const last = Math.min(psd.length - 1, Math.max(first + 8, Math.round((centreHz + widthHz / 2) / spacingHz)));
    const lines = psd.slice(first, last + 1).sort();
    const nextHz = centreHz + widthHz / 4;
    const to = nextHz >= topHz ? psd.length : Math.ceil((centreHz + nextHz) / 2 / spacingHz);
    floor.fill(lines[lines.length >> 1] ?? 0, from, to);
    from = Math.max(to, from + 1);
    centreHz = nextHz;
  }
  return floor;
}

/** Lines that are local maxima and stand out of the floor, strongest first. */
export function peakLines({ psd, spacingHz, blocks }: Spectrum, floor: Float64Array): number[] {
  const factor = peakFactor(blocks);
  const least = ROUNDING_SHARE * psd.reduce((sum, line) => sum + line, 0);
  const peaks: number[] = [];
  for (let k = Math.max(3, Math.round(SEARCH_FROM_HZ / spacingHz)); k < psd.length - 2; k += 1) {
    const line = psd[k] ?? 0;
    if (line > (psd[k - 1] ?? 0) && line >= (psd[k + 1] ?? 0) && line >= factor * (floor[k] ?? 0) && line > least)
      peaks.push(k);
  }
  return peaks.sort((a, b) => (psd[b] ?? 0) - (psd[a] ?? 0));
}

export interface ToneBand {
  /** First and last line. */
  from: number;
  to: number;
  /** The edge lines, between which the noise under the tone is taken as straight, unit squared per Hz. */
  lower: number;
  upper: number;
  /** Centre of gravity of what lies above that straight line, Hz. */
  frequencyHz: number;
  /** Mean square above that straight line, unit squared. */
  power: number;
}

/** Lowest line on one side of a peak within `reach` lines, not beyond a clear valley or another tone. */
function edge(psd: Float64Array, peak: number, direction: 1 | -1, reach: number, claimed: Uint8Array): number {
  let best = peak;
  for (let step = 1; step <= reach; step += 1) {
    const k = peak + direction * step;
    const line = psd[k];
    if (line === undefined || k < 1 || claimed[k] === 1) break;
    const lowest = psd[best] ?? 0;
    if (line < lowest) best = k;
    else if (step > 2 && line > VALLEY_FACTOR * lowest) break;
  }
  return best;
}

/**
 * The lines of a tone: between the minima either side of the peak, within 15 % of the critical band in all, and what
 * of them lies above the straight line that joins the two. Undefined where that is no tone but a bump in the noise.
 * Source: ECMA-418-1:2024 clause 11.2 and Formula (9).
 */
export function toneBand(spectrum: Spectrum, peak: number, claimed: Uint8Array): ToneBand | undefined {
  const { psd, spacingHz } = spectrum;
  const reach = Math.max(3, Math.round((0.075 * criticalBand(peak * spacingHz).widthHz) / spacingHz));
  const from = edge(psd, peak, -1, reach, claimed);
  const to = edge(psd, peak, 1, reach, claimed);
  const lower = psd[from] ?? 0;
  const upper = psd[to] ?? 0;
  const height = Math.max(2, Math.sqrt(peakFactor(spectrum.blocks)));
  if (from === peak || to === peak || (psd[peak] ?? 0) < (height * (lower + upper)) / 2) return undefined;
  let sum = 0;
  let raised = 0;
  let moment = 0;
  for (let k = from; k <= to; k += 1) {
    const above = (psd[k] ?? 0) - (lower + ((upper - lower) * (k - from)) / (to - from));
    sum += above;
    raised += Math.max(0, above);
    moment += Math.max(0, above) * (k - peak);
  }
  if (!(sum > 0)) return undefined;
  return { from, to, lower, upper, power: sum * spacingHz, frequencyHz: (peak + moment / raised) * spacingHz };
}
