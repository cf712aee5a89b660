function gcd(a: number, b: number): number {
  return b === 0 ? a : gcd(b, a % b);
}

export interface Encounters {
  /** Blade pairs that align at the same instant. */
  pairsAtOnce: number;
  /** Distinct instants a relative revolution, and encounters (pairs) a relative revolution. */
  instantsPerRelativeRev: number;
  encountersPerRelativeRev: number;
  relativeRevPerRotor1Rev: number;
  instantsPerRotor1Rev: number;
  /** Instants a second, Hz: the lowest interaction tone of mode order 0. */
  instantRateHz: number;
}

/**
 * How often blades of two rotors pass each other, equal spacing.
 *
 * In: blade counts (whole, 1 or more), speeds in rpm above 0, whether the rotors turn against each other.
 * Source: kinematics; gcd and lcm of the blade counts.
 */
export function encounters(
  blades: readonly [number, number],
  rpm: readonly [number, number],
  counterRotating = true,
): Encounters {
  const [b1, b2] = blades;
  const [rpm1, rpm2] = rpm;
  const pairsAtOnce = gcd(b1, b2);
  const instantsPerRelativeRev = (b1 * b2) / pairsAtOnce;
  const relativeRpm = counterRotating ? rpm1 + rpm2 : Math.abs(rpm1 - rpm2);
  const relativeRevPerRotor1Rev = relativeRpm / rpm1;
  return {
    pairsAtOnce,
    instantsPerRelativeRev,
    encountersPerRelativeRev: b1 * b2,
    relativeRevPerRotor1Rev,
    instantsPerRotor1Rev: instantsPerRelativeRev * relativeRevPerRotor1Rev,
    instantRateHz: (instantsPerRelativeRev * relativeRpm) / 60,
  };
}
