/** How the blades of two rotors meet. */
export interface Crossings {
  /** Largest number of blades that line up at once. */
  readonly together: number;
  /** Least common multiple of the blade numbers. */
  readonly cycle: number;
  /** Instants at which blades line up, in one revolution of rotor 1. */
  readonly instantsPerRevolution: number;
  /** Single encounters of one blade with another in that revolution. */
  readonly encountersPerRevolution: number;
  /** Orders (m₁, m₂) of the first interaction tone that is a plane wave, and its frequency in Hz. */
  readonly planeMode: { readonly m1: number; readonly m2: number; readonly frequencyHz: number } | undefined;
}

/** Greatest common divisor of two whole numbers above zero. */
export function greatestCommonDivisor(a: number, b: number): number {
  return b === 0 ? a : greatestCommonDivisor(b, a % b);
}

/** Least common multiple of two whole numbers above zero. */
export function leastCommonMultiple(a: number, b: number): number {
  return (a / greatestCommonDivisor(a, b)) * b;
}

/**
 * Crossings of two rotors with `blades1` and `blades2` equally spaced blades at `speed1Rpm` and `speed2Rpm` (above
 * zero). Counter-rotating, one turn against the other takes 1/(1 + n₂/n₁) of a revolution of rotor 1; co-rotating,
 * 1/|1 − n₂/n₁|. In one relative turn blades line up lcm(B₁, B₂) times, gcd(B₁, B₂) pairs at once. The tone (m₁, m₂)
 * turns with m₁B₁ − m₂B₂ (counter) or m₁B₁ + m₂B₂ lobes; with 0 lobes it is a plane wave, which no duct cuts off
 * (Tyler & Sofrin, SAE 620532). Throws a RangeError for numbers that aren't whole or aren't above zero.
 */
export function bladeCrossings(
  blades1: number,
  blades2: number,
  speed1Rpm: number,
  speed2Rpm: number,
  counterRotating: boolean,
): Crossings {
  if (![blades1, blades2].every((b) => Number.isInteger(b) && b > 0) || !(speed1Rpm > 0) || !(speed2Rpm > 0)) {
    throw new RangeError("blades are whole numbers above zero and speeds are above zero");
  }
  const together = greatestCommonDivisor(blades1, blades2);
  const cycle = leastCommonMultiple(blades1, blades2);
  const ratio = speed2Rpm / speed1Rpm;
  const relativeTurns = counterRotating ? 1 + ratio : Math.abs(1 - ratio);
  const [m1, m2] = [cycle / blades1, cycle / blades2];
  const frequencyHz = (cycle * relativeTurns * speed1Rpm) / 60;
  return {
    together,
    cycle,
    instantsPerRevolution: cycle * relativeTurns,
    encountersPerRevolution: blades1 * blades2 * relativeTurns,
    planeMode: frequencyHz > 0 ? { m1, m2: counterRotating ? m2 : -m2, frequencyHz } : undefined,
  };
}

/** Angles in [0, 2π) of the blades of a rotor after it has turned: a picture of the crossings can be stepped with it. */
export function bladeAngles(blades: number, turnedRad: number): number[] {
  const turn = 2 * Math.PI;
  return Array.from({ length: blades }, (_, k) => ((((turn * k) / blades + turnedRad) % turn) + turn) % turn);
}
