/**
 * Loudness in sone from a loudness level in phon: N = 2^((P − 40)/10) from 40 phon up, below it the inverse of
 * P = 40·(N + 0.0005)^0.35. Never to be used on dB(A). Not below 3 phon, the floor of the method (gives 0).
 * Source: ISO 532-1:2017 clause 5.3 and, below 40 phon, the reference program of Annex A.4.
 */
export function soneFromPhon(phon: number): number {
  if (phon >= 40) return 2 ** ((phon - 40) / 10);
  return phon <= 3 ? 0 : Math.max(0, (phon / 40) ** (1 / 0.35) - 0.0005);
}

/**
 * Loudness level in phon from loudness in sone (0 or more): P = 40 + 10 log₂ N from 1 sone up, else
 * 40·(N + 0.0005)^0.35, at least 3 phon.
 * Source: ISO 532-1:2017 clause 5.3; the offset and the floor are in the reference program of Annex A.4 only.
 */
export function phonFromSone(sone: number): number {
  return sone >= 1 ? 40 + 10 * Math.log2(sone) : Math.max(3, 40 * (sone + 0.0005) ** 0.35);
}
