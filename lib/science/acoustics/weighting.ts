/** Pole frequencies of the A and C weightings, Hz (IEC 61672-1:2013 Annex E, derived rather than the printed roundings). */
const LOW_HZ = 10 ** 1.5;
const HIGH_HZ = 10 ** 3.9;
const MIDDLE_HZ = 10 ** 2.45;
const REFERENCE_HZ = 1000;
const D = Math.SQRT1_2;
const c = (LOW_HZ * HIGH_HZ) ** 2;
const b = (REFERENCE_HZ ** 2 + c / REFERENCE_HZ ** 2 - D * (LOW_HZ ** 2 + HIGH_HZ ** 2)) / (1 - D);
const root = Math.sqrt(b * b - 4 * c);

/** f₁ … f₄ of Annex E in Hz: about 20.599, 107.653, 737.862 and 12194.217. */
export const WEIGHTING_POLES_HZ = [
  Math.sqrt((-b - root) / 2),
  ((3 - Math.sqrt(5)) / 2) * MIDDLE_HZ,
  ((3 + Math.sqrt(5)) / 2) * MIDDLE_HZ,
  Math.sqrt((-b + root) / 2),
] as const;

const [F1, F2, F3, F4] = WEIGHTING_POLES_HZ.map((pole) => pole * pole) as [number, number, number, number];

function rawA(frequencyHz: number): number {
  const f = frequencyHz * frequencyHz;
  return (F4 * F4 * f ** 4) / ((f + F1) ** 2 * (f + F2) * (f + F3) * (f + F4) ** 2);
}

function rawC(frequencyHz: number): number {
  const f = frequencyHz * frequencyHz;
  return (F4 * F4 * f * f) / ((f + F1) ** 2 * (f + F4) ** 2);
}

const A_AT_1K = rawA(REFERENCE_HZ);
const C_AT_1K = rawC(REFERENCE_HZ);

export type Weighting = "A" | "C" | "Z";

/**
 * Factor that a frequency weighting puts on power (mean square), dimensionless.
 *
 * In: frequency in Hz, 0 or more. Out: 1 at 1 kHz exactly; 0 at 0 Hz for A and C. Meant for 10 Hz to 20 kHz.
 * Source: IEC 61672-1:2013 Annex E, closed form, with the unrounded normalisation.
 */
export function weightingPower(weighting: Weighting, frequencyHz: number): number {
  if (weighting === "A") return rawA(frequencyHz) / A_AT_1K;
  if (weighting === "C") return rawC(frequencyHz) / C_AT_1K;
  return 1;
}

/**
 * A, C or Z weighting in dB at a frequency in Hz (above 0; -Infinity at 0 for A and C).
 * Source: IEC 61672-1:2013 Annex E, Eq. (E.1) to (E.9).
 */
export function weightingDb(weighting: Weighting, frequencyHz: number): number {
  return weighting === "Z" ? 0 : 10 * Math.log10(weightingPower(weighting, frequencyHz));
}
