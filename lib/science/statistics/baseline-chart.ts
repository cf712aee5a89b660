/** B − A of readings in the order A, B, B, A: a linear drift cancels exactly (value from memory: double substitution). */
export function abba([a1, b1, b2, a2]: readonly [number, number, number, number]): number {
  return (b1 + b2) / 2 - (a1 + a2) / 2;
}

/** Two single results of one bench should differ by less, 95 %: 2.8·s_r (ISO 5725-6), unit of s_r. */
export function repeatabilityLimit(sRepeat: number): number {
  return 2.8 * sRepeat;
}

/** Whether a calibrator's readings before and after are close enough, dB (0.5 dB: ISO 3744:2010, 5.2; value from memory). */
export function calibratorHolds(beforeDb: number, afterDb: number, limitDb = 0.5): boolean {
  return Math.abs(afterDb - beforeDb) <= limitDb + 1e-9;
}
