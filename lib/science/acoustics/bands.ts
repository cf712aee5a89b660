import { energySum } from "./levels";
import { weightingDb, type Weighting } from "./weighting";
import { WEIGHTING_TABLE } from "./weighting-table";

/** The R10 series of IEC 61260-1:2014 Annex E (ISO 266), from which every nominal mid-band is labelled. */
const R10 = [1, 1.25, 1.6, 2, 2.5, 3.15, 4, 5, 6.3, 8] as const;

export interface Band {
  /** Position in the series: 0 at 1 kHz. */
  index: number;
  /** Label of the band, Hz. */
  nominalHz: number;
  /** Exact mid-band frequency, Hz. */
  midHz: number;
  lowerHz: number;
  upperHz: number;
}

function nominal(step: number): number {
  const decade = Math.floor(step / 10);
  const value = (R10[step - 10 * decade] ?? 1) * 10 ** decade * 1000;
  return Number(value.toPrecision(4));
}

/**
 * One-third-octave band x of the base-10 series: mid-band 1000·10^(x/10) Hz, edges a factor of 10^(±1/20) away.
 *
 * In: x, an integer (−16 is 25 Hz, 0 is 1 kHz, 12 is 16 kHz). Out: frequencies in Hz.
 * Source: IEC 61260-1:2014 5.2 to 5.5; labels Annex E, by x and never by rounding the mid-band.
 */
export function thirdOctave(x: number): Band {
  const midHz = 1000 * 10 ** (x / 10);
  return { index: x, nominalHz: nominal(x), midHz, lowerHz: midHz * 10 ** (-1 / 20), upperHz: midHz * 10 ** (1 / 20) };
}

/** Octave band x: mid-band 1000·10^(3x/10) Hz, edges a factor of 10^(±3/20) away. Source: IEC 61260-1:2014, b = 1. */
export function octave(x: number): Band {
  const midHz = 1000 * 10 ** ((3 * x) / 10);
  const ratio = 10 ** (3 / 20);
  return { index: x, nominalHz: nominal(3 * x), midHz, lowerHz: midHz / ratio, upperHz: midHz * ratio };
}

/** The one-third-octave bands that a recording is read into: 25 Hz to 16 kHz, in rising order. */
export const RECORDING_BANDS: readonly Band[] = Array.from({ length: 29 }, (_, step) => thirdOctave(step - 16));

/**
 * Overall level from band levels, in dB: 10 lg Σ 10^((L_k + W_k)/10).
 *
 * In: levels in dB with the series index x of each one-third-octave band; the weighting; whether W_k is the exact
 * value at mid-band or the printed 0.1 dB value. Out: dB; undefined for no bands. True only where the bands cover all
 * the energy; W is taken at mid-band, so a tone near a band edge at low frequency reads some tenths off.
 * Source: ISO 3744:2010 Annex E Eq. (E.1).
 */
export function overallFromBands(
  bands: readonly { index: number; levelDb: number }[],
  weighting: Weighting,
  values: "exact" | "printed" = "exact",
): number | undefined {
  return energySum(
    bands.map(({ index, levelDb }) => {
      if (values === "exact" || weighting === "Z") return levelDb + weightingDb(weighting, thirdOctave(index).midHz);
      const row = WEIGHTING_TABLE.find((candidate) => candidate.nominalHz === nominal(index));
      if (row === undefined) throw new RangeError(`No printed weighting for band ${index}.`);
      return levelDb + (weighting === "A" ? row.aDb : row.cDb);
    }),
  );
}
