/** Tones that the standard covers, Hz: from the first to below the second. Source: ECMA-418-1:2024 clause 8. */
export const TONE_RANGE_HZ = { from: 89.1, to: 11200 } as const;

export interface CriticalBand {
  widthHz: number;
  lowerHz: number;
  upperHz: number;
}

/**
 * Critical band about a tone, Hz: arithmetic about the tone up to 500 Hz, geometric above.
 * Source: ECMA-418-1:2024 clause 10, Formulae (2), (4), (5), (7), (8).
 */
export function criticalBand(toneHz: number): CriticalBand {
  const widthHz = 25 + 75 * (1 + 1.4 * (toneHz / 1000) ** 2) ** 0.69;
  const lowerHz =
    toneHz <= 500 ? toneHz - widthHz / 2 : -widthHz / 2 + Math.sqrt(widthHz * widthHz + 4 * toneHz * toneHz) / 2;
  return { widthHz, lowerHz, upperHz: lowerHz + widthHz };
}

const quadratic = (toneHz: number, c0: number, c1: number, c2: number) => c0 + c1 * toneHz + c2 * toneHz * toneHz;

/** Below this frequency, Hz, the lower band is cut at 20 Hz and scaled to 100 Hz. */
const CUT_LOWER_BAND_HZ = 171.4;

export interface ProminenceBands {
  /** Edges in Hz of the lower, middle and upper critical band, rising: lower from, middle from, middle to, upper to. */
  lowerFromHz: number;
  middleFromHz: number;
  middleToHz: number;
  upperToHz: number;
}

/**
 * The three contiguous critical bands of the prominence ratio, Hz.
 * Source: ECMA-418-1:2024 clause 12, Formulae (21) and (22), Tables 2 and 3.
 */
export function prominenceBands(toneHz: number): ProminenceBands {
  const { lowerHz, upperHz } = criticalBand(toneHz);
  let lowerFromHz = 20;
  if (toneHz > 1600) lowerFromHz = quadratic(toneHz, 6.8, 0.806, -8.2e-6);
  else if (toneHz > CUT_LOWER_BAND_HZ) lowerFromHz = quadratic(toneHz, -149.5, 1.001, -6.9e-5);
  const upperToHz = toneHz > 1600 ? quadratic(toneHz, 3.3, 1.215, 2.16e-5) : quadratic(toneHz, 149.5, 1.035, 7.7e-5);
  return { lowerFromHz, middleFromHz: lowerHz, middleToHz: upperHz, upperToHz };
}

/**
 * Tone-to-noise ratio in dB from powers (mean squares in one unit): the rest of the critical band, scaled from the width
 * that was summed to the full critical bandwidth, under the tone. Infinity without noise.
 * Source: ECMA-418-1:2024 clause 11, Formulae (10) and (11); older texts leave the tone's own width out.
 */
export function toneToNoiseDb(input: {
  toneHz: number;
  tonePower: number;
  /** Power of the whole critical band. */
  bandPower: number;
  /** Width that the band's sum covers, Hz. */
  summedHz: number;
  /** Power of further tones in the band, which is no noise either. */
  otherTonesPower?: number;
}): number {
  const { toneHz, tonePower, bandPower, summedHz, otherTonesPower = 0 } = input;
  const noise = ((bandPower - tonePower - otherTonesPower) * criticalBand(toneHz).widthHz) / summedHz;
  return noise > 0 ? 10 * Math.log10(tonePower / noise) : Infinity;
}

/**
 * Prominence ratio in dB from the powers of the middle, lower and upper band (mean squares in one unit).
 * Infinity where both neighbours are empty. Below about 70 Hz, outside the standard's range, no lower band is left and the
 * upper one stands alone. Source: ECMA-418-1:2024 clause 12, Formulae (23) and (24).
 */
export function prominenceRatioDb(input: {
  toneHz: number;
  middlePower: number;
  lowerPower: number;
  upperPower: number;
  /** Summed width of the lower band, Hz; the band's own width when left out. */
  lowerSummedHz?: number;
}): number {
  const { toneHz, middlePower, lowerPower, upperPower } = input;
  const bands = prominenceBands(toneHz);
  const lowerHz = input.lowerSummedHz ?? bands.middleFromHz - bands.lowerFromHz;
  const scaled = toneHz <= CUT_LOWER_BAND_HZ ? (100 / lowerHz) * lowerPower : lowerPower;
  const neighbours = lowerHz > 0 ? (scaled + upperPower) / 2 : upperPower;
  return neighbours > 0 ? 10 * Math.log10(middlePower / neighbours) : Infinity;
}

/** Tone-to-noise ratio in dB from which a tone is prominent. Source: ECMA-418-1:2024 11.5, Formulae (12), (13). */
export function toneToNoiseCriterionDb(toneHz: number): number {
  return toneHz >= 1000 ? 8 : 8 + 8.33 * Math.log10(1000 / toneHz);
}

/** Prominence ratio in dB from which a tone is prominent. Source: ECMA-418-1:2024 12.6, Formulae (25), (26). */
export function prominenceCriterionDb(toneHz: number): number {
  return toneHz >= 1000 ? 9 : 9 + 10 * Math.log10(1000 / toneHz);
}

/**
 * Spacing in Hz below which two tones of one critical band are heard as one; from 1 kHz up they always are (Infinity).
 * Source: ECMA-418-1:2024 11.6, Formula (14).
 */
export function proximityHz(toneHz: number): number {
  return toneHz >= 1000 ? Infinity : 21 * 10 ** (1.2 * Math.abs(Math.log10(toneHz / 212)) ** 1.8);
}

/**
 * Whether a tone is prominent: by either ratio. Null where the standard doesn't reach (below 89.1 Hz, from 11.2 kHz), which is
 * "not assessable" and never "not tonal", or where neither ratio is known.
 * Source: ECMA-418-1:2024 clauses 8, 11.5 and 12.6.
 */
export function isProminent(
  toneHz: number,
  ratioDb: number | undefined,
  prominenceDb: number | undefined,
): boolean | null {
  if (toneHz < TONE_RANGE_HZ.from || toneHz >= TONE_RANGE_HZ.to) return null;
  if (ratioDb === undefined && prominenceDb === undefined) return null;
  return (
    (ratioDb !== undefined && ratioDb >= toneToNoiseCriterionDb(toneHz)) ||
    (prominenceDb !== undefined && prominenceDb >= prominenceCriterionDb(toneHz))
  );
}
