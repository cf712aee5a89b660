/**
 * Two readings of one session: y = x(1 + gain) + offset + own, gain and offset common to both, own parts independent.
 * Derived from JCGM 100:2008, 5.2.2 with cov(y1, y2) = u_offset² + y1·y2·u_gain².
 */
export interface PairedReadings {
  readonly design: number;
  readonly baseline: number;
  /** Standard uncertainty of each reading's own part (repeats, remount), unit of the reading. */
  readonly uOwnDesign: number;
  readonly uOwnBaseline: number;
  /** Shared additive part, unit of the reading; 0 for none. */
  readonly uOffset: number;
  /** Shared relative part, dimensionless; 0 for none. */
  readonly uGainRel: number;
}

/** Design − baseline: the offset cancels, the gain acts on the difference only. Unit of the readings. */
export function difference(pair: PairedReadings): { value: number; u: number } {
  const value = pair.design - pair.baseline;
  return { value, u: Math.hypot(pair.uOwnDesign, pair.uOwnBaseline, value * pair.uGainRel) };
}

/** Design ÷ baseline, dimensionless: the gain cancels, the offset acts on 1/design − 1/baseline. Both readings ≠ 0. */
export function ratio(pair: PairedReadings): { value: number; u: number } {
  const value = pair.design / pair.baseline;
  const relative = Math.hypot(
    pair.uOwnDesign / pair.design,
    pair.uOwnBaseline / pair.baseline,
    pair.uOffset * (1 / pair.design - 1 / pair.baseline),
  );
  return { value, u: Math.abs(value) * relative };
}

/** Whole standard uncertainty of one reading of the pair (own, offset and gain), unit of the reading. */
export function uncertaintyOfReading(value: number, uOwn: number, uOffset: number, uGainRel: number): number {
  return Math.hypot(uOwn, uOffset, value * uGainRel);
}

/** Correlation of the two readings, −1..1; undefined when one of them has no uncertainty at all. */
export function sharedCorrelation(pair: PairedReadings): number | undefined {
  const uDesign = uncertaintyOfReading(pair.design, pair.uOwnDesign, pair.uOffset, pair.uGainRel);
  const uBaseline = uncertaintyOfReading(pair.baseline, pair.uOwnBaseline, pair.uOffset, pair.uGainRel);
  if (uDesign === 0 || uBaseline === 0) return undefined;
  return (pair.uOffset ** 2 + pair.design * pair.baseline * pair.uGainRel ** 2) / (uDesign * uBaseline);
}

/**
 * Variance of a mean over m mounts with k repeats each: s_mount²/m + s_rep²/(mk), as a standard uncertainty.
 * Repeats without a remount don't lower the first part.
 */
export function uOfMountsAndRepeats(sMount: number, sRepeat: number, mounts: number, repeats: number): number {
  return Math.sqrt(sMount ** 2 / mounts + sRepeat ** 2 / (mounts * repeats));
}
