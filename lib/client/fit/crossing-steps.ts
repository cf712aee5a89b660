import { bladeAngles, bladeCrossings, greatestCommonDivisor, type Crossings } from "@/lib/science/mechanics/crossings";

export type { Crossings };

/** Two rotors at one moment. */
export interface CrossingStep {
  readonly firstRad: number[];
  readonly secondRad: number[];
  /** Pairs of blades that stand in line, by their numbers. */
  readonly pairs: { readonly first: number; readonly second: number }[];
  /** How far each has turned, degrees. */
  readonly firstTurnedDeg: number;
}

/** How the blades of two rotors meet; undefined where two don't turn against each other. */
export function crossingsOf(first: number, second: number, speedRpm: number, counter: boolean, ratio = 1) {
  if (!(speedRpm > 0) || !(ratio > 0) || (!counter && ratio === 1)) return undefined;
  return bladeCrossings(first, second, speedRpm, speedRpm * ratio, counter);
}

/**
 * The rotors at half-step `step` of their crossings: even steps have blades in line (gcd of the numbers of them at
 * once), odd ones are half-way to the next. Rotor 2 turns at `ratio` of rotor 1's speed, against it or with it.
 */
export function crossingStep(
  first: number,
  second: number,
  counter: boolean,
  ratio: number,
  step: number,
): CrossingStep {
  const cycle = (first * second) / greatestCommonDivisor(first, second);
  const relative = counter ? 1 + ratio : 1 - ratio;
  const turned = (Math.PI * step) / cycle / relative;
  const firstRad = bladeAngles(first, turned);
  const secondRad = bladeAngles(second, counter ? -turned * ratio : turned * ratio);
  const pairs = firstRad.flatMap((a, i) =>
    secondRad.flatMap((b, j) => (Math.abs(Math.sin((a - b) / 2)) < 1e-6 ? [{ first: i, second: j }] : [])),
  );
  return { firstRad, secondRad, pairs, firstTurnedDeg: (turned * 180) / Math.PI };
}
