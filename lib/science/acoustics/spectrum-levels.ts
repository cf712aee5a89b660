import { RECORDING_BANDS } from "./bands";
import { weightingPower, type Weighting } from "./weighting";
import type { Spectrum } from "./welch";

/** Between these frequencies, in Hz, the Z level is summed. A and C need no limits: they weight every line themselves. */
export const Z_RANGE_HZ = { from: 10, to: 20000 } as const;

/**
 * Mean square between two frequencies, in the signal's unit squared.
 *
 * Each line stands for the spacing about it, and one that straddles an edge counts by the part inside. Frequencies in
 * Hz; above the last line nothing is added. Source: definition of the power spectral density.
 */
export function bandPower(spectrum: Spectrum, lowerHz: number, upperHz: number, weighting: Weighting = "Z"): number {
  const { psd, spacingHz } = spectrum;
  const first = Math.max(0, Math.round(lowerHz / spacingHz));
  const last = Math.min(psd.length - 1, Math.round(upperHz / spacingHz));
  let power = 0;
  for (let k = first; k <= last; k += 1) {
    const from = Math.max((k - 0.5) * spacingHz, lowerHz, 0);
    const to = Math.min((k + 0.5) * spacingHz, upperHz);
    if (to <= from) continue;
    const weight = weighting === "Z" ? 1 : weightingPower(weighting, k * spacingHz);
    power += (psd[k] ?? 0) * weight * (to - from);
  }
  return power;
}

export interface SpectrumLevels {
  levelZDb: number;
  levelCDb: number;
  levelADba: number;
  /** One a band of RECORDING_BANDS; undefined where the band reaches beyond half the sample rate. */
  bandsDb: (number | undefined)[];
}

/** The same as mean squares in the signal's unit squared; null for a band beyond half the sample rate. Plain JSON. */
export interface SpectrumPowers {
  z: number;
  c: number;
  a: number;
  bands: (number | null)[];
}

/** Mean squares that overall and band levels are made of; see spectrumLevels. */
export function spectrumPowers(spectrum: Spectrum): SpectrumPowers {
  const topHz = (spectrum.psd.length - 1) * spectrum.spacingHz;
  return {
    z: bandPower(spectrum, Z_RANGE_HZ.from, Z_RANGE_HZ.to),
    c: bandPower(spectrum, 0, Infinity, "C"),
    a: bandPower(spectrum, 0, Infinity, "A"),
    bands: RECORDING_BANDS.map(({ lowerHz, upperHz }) =>
      upperHz > topHz ? null : bandPower(spectrum, lowerHz, upperHz),
    ),
  };
}

/** Levels in dB of mean squares, given the level of a signal whose rms is 1 in their unit. -Infinity for no power. */
export function levelsOfPowers(powers: SpectrumPowers, unitLevelDb: number): SpectrumLevels {
  const levelDb = (power: number) => (power > 0 ? 10 * Math.log10(power) + unitLevelDb : -Infinity);
  return {
    levelZDb: levelDb(powers.z),
    levelCDb: levelDb(powers.c),
    levelADba: levelDb(powers.a),
    bandsDb: powers.bands.map((power) => (power === null ? undefined : levelDb(power))),
  };
}

/**
 * Overall levels (Z over 10 Hz to 20 kHz; C and A over every line) and one-third-octave band levels of a spectrum, in dB.
 *
 * In: spectrum in units squared per Hz; the level in dB of a signal whose rms is 1 in that unit. -Infinity for no
 * power. Bands are ideal rectangles ("fft-rect"): true for broadband sound, but a tone shows nothing in its neighbours.
 * Source: IEC 61672-1:2013 Annex E (weightings), IEC 61260-1:2014 (bands).
 */
export function spectrumLevels(spectrum: Spectrum, unitLevelDb: number): SpectrumLevels {
  return levelsOfPowers(spectrumPowers(spectrum), unitLevelDb);
}
