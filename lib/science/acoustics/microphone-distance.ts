/**
 * What a microphone at the wrong distance reads too much, dB: 20 lg(nominal ÷ actual), far from a small source in a free
 * field (inverse square law). Near a fan it is less; on a bench the distance is fixed and the error is shared.
 * @param nominalM, actualM distances from the source, m, above 0
 */
export function distanceErrorDb(nominalM: number, actualM: number): number {
  if (!(nominalM > 0 && actualM > 0)) throw new RangeError("a distance is above 0");
  return 20 * Math.log10(nominalM / actualM);
}
