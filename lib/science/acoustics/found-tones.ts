import { criticalBand, prominenceBands, prominenceRatioDb, proximityHz, toneToNoiseDb } from "./ecma-tones";
import { bandPower } from "./spectrum-levels";
import { noiseFloor, peakLines, toneBand, type ToneBand } from "./tone-peaks";
import type { Spectrum } from "./welch";

/** Tones are listed from here up, Hz, and at most so many. */
export const LOWEST_TONE_HZ = 40;
export const MOST_TONES = 40;

export interface FoundTone {
  frequencyHz: number;
  /** Mean square of the tone, in the spectrum's unit squared. */
  power: number;
  /** dB; Infinity where there is no noise to compare with. */
  toneToNoiseDb: number;
  /** dB; undefined where a neighbouring band reaches beyond the spectrum. */
  prominenceDb: number | undefined;
  /** False where a stronger tone lies in the same critical band: the prominence ratio is then that tone's. */
  leads: boolean;
}

/**
 * Tones of a spectrum: peaks that stand out of their surroundings, with tone-to-noise ratio and prominence ratio.
 *
 * In: Hann spectrum with lines 1 to 2 Hz apart. Out: tones from 40 Hz up whose tone-to-noise ratio or prominence ratio is
 * above 0 dB, the 40 with the highest tone-to-noise ratio, in rising frequency; empty for none. The frequency is the
 * centre of gravity of the tone's lines, so a speed that drifts a little gives its mean. No background correction.
 * Source: ECMA-418-1:2024 clauses 10 to 12; what counts as a peak is the house's rule (see tone-peaks).
 */
export function findTones(spectrum: Spectrum): FoundTone[] {
  const bands = toneBands(spectrum);
  const residual = spectrum.psd.slice();
  for (const { from, to, lower, upper } of bands) {
    for (let k = from; k <= to; k += 1) residual[k] = lower + ((upper - lower) * (k - from)) / (to - from);
  }
  const tones = bands.map((band) => rate(band, bands, residual, spectrum));
  return tones
    .filter((tone) => tone.frequencyHz >= LOWEST_TONE_HZ && (tone.toneToNoiseDb > 0 || (tone.prominenceDb ?? 0) > 0))
    .sort((a, b) => b.toneToNoiseDb - a.toneToNoiseDb || b.power - a.power)
    .slice(0, MOST_TONES)
    .sort((a, b) => a.frequencyHz - b.frequencyHz);
}

/**
 * Strongest peaks first, each claiming its lines, so that one smeared tone is one tone. The valley between two tones is
 * left unclaimed: both may stand on it.
 */
function toneBands(spectrum: Spectrum): ToneBand[] {
  const claimed = new Uint8Array(spectrum.psd.length);
  const bands: ToneBand[] = [];
  for (const peak of peakLines(spectrum, noiseFloor(spectrum))) {
    if (claimed[peak] === 1) continue;
    const band = toneBand(spectrum, peak, claimed);
    if (band === undefined) continue;
    claimed.fill(1, band.from + 1, band.to);
    bands.push(band);
  }
  return bands;
}

function rate(tone: ToneBand, all: readonly ToneBand[], residual: Float64Array, spectrum: Spectrum): FoundTone {
  const { spacingHz, psd } = spectrum;
  const { frequencyHz, power } = tone;
  const band = criticalBand(frequencyHz);
  const first = Math.max(2, Math.floor(band.lowerHz / spacingHz) + 1);
  const last = Math.min(psd.length - 1, Math.floor(band.upperHz / spacingHz));
  let noise = 0;
  for (let k = first; k <= last; k += 1) noise += (residual[k] ?? 0) * spacingHz;
  const neighbours = all.filter(
    (other) => other !== tone && other.frequencyHz > band.lowerHz && other.frequencyHz <= band.upperHz,
  );
  // The second tone of a band, where near enough to be heard with the first, counts with it (clause 11.6).
  const second = neighbours.reduce<ToneBand | undefined>(
    (top, other) => (other.power > (top?.power ?? 0) ? other : top),
    undefined,
  );
  const leads = second === undefined || second.power <= power;
  const near = second !== undefined && Math.abs(second.frequencyHz - frequencyHz) < proximityHz(frequencyHz);
  const tonePower = power + (leads && near ? second.power : 0);
  const ratioDb = toneToNoiseDb({
    toneHz: frequencyHz,
    tonePower,
    bandPower: tonePower + noise,
    summedHz: (last - first + 1) * spacingHz,
  });
  return { frequencyHz, power, toneToNoiseDb: ratioDb, prominenceDb: prominence(frequencyHz, spectrum), leads };
}

function prominence(toneHz: number, spectrum: Spectrum): number | undefined {
  const { lowerFromHz, middleFromHz, middleToHz, upperToHz } = prominenceBands(toneHz);
  if (upperToHz > (spectrum.psd.length - 1) * spectrum.spacingHz) return undefined;
  return prominenceRatioDb({
    toneHz,
    middlePower: bandPower(spectrum, Math.max(middleFromHz, 0), middleToHz),
    lowerPower: bandPower(spectrum, lowerFromHz, Math.max(middleFromHz, lowerFromHz)),
    upperPower: bandPower(spectrum, middleToHz, upperToHz),
  });
}
