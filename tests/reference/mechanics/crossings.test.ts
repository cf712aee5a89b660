import { describe, expect, it } from "vitest";
import { bladeAngles, bladeCrossings } from "@/lib/science/mechanics/crossings";
import entries from "../values/acoustics.json";

interface Encounter {
  readonly id: string;
  readonly fromMemory?: boolean;
  readonly inputs: { B1: number; B2: number; rpm1: number; rpm2: number; counterRotating?: boolean };
  readonly expected: Record<string, number>;
}

// Values of the acoustics handbook, section on blade encounters: made by exact-fraction brute force.
const encounters = (entries as unknown as Encounter[]).filter((entry) => entry.id.startsWith("ENC-"));

describe("blade crossings", () => {
  it("has check values to hold to", () => expect(encounters.length).toBeGreaterThan(3));

  it.each(encounters)("$id (brute force over exact fractions)", ({ inputs, expected }) => {
    const found = bladeCrossings(inputs.B1, inputs.B2, inputs.rpm1, inputs.rpm2, inputs.counterRotating ?? true);
    expect(found.together).toBe(expected["gcd_simultaneousPairs"]);
    expect(found.cycle).toBe(expected["lcm_instantsPerRelativeRev"]);
    expect(found.instantsPerRevolution).toBeCloseTo(expected["instantsPerRotor1Rev"] ?? NaN, 6);
    expect(found.planeMode?.frequencyHz).toBeCloseTo(expected["lowestPlaneMode_Hz"] ?? NaN, 3);
  });

  // Independent count: step through one revolution of rotor 1 and see blades pass each other.
  it.each([
    [9, 7],
    [11, 7],
    [8, 6],
    [5, 5],
  ])("%i against %i blades meet as often as stepping shows", (b1, b2) => {
    const pairsTogether = new Map<string, number>();
    for (let i = 0; i < b1; i++) {
      for (let j = 0; j < b2; j++) {
        // Equal speeds, opposite: blade i at t + i/b1, blade j at −t + j/b2 turns; they meet where 2 t = j/b2 − i/b1.
        for (let turn = 0; turn < 2; turn++) {
          const numerator = (((j * b1 - i * b2) % (b1 * b2)) + b1 * b2) % (b1 * b2);
          const key = `${turn}:${numerator}`;
          pairsTogether.set(key, (pairsTogether.get(key) ?? 0) + 1);
        }
      }
    }
    const found = bladeCrossings(b1, b2, 1800, 1800, true);
    expect(found.instantsPerRevolution).toBe(pairsTogether.size);
    expect(found.encountersPerRevolution).toBe(2 * b1 * b2);
    expect(Math.max(...pairsTogether.values())).toBe(found.together);
  });

  it("has no plane mode for rotors that turn together at one speed", () => {
    expect(bladeCrossings(7, 5, 1500, 1500, false).planeMode).toBeUndefined();
  });

  it("refuses blades that can't be", () => {
    expect(() => bladeCrossings(0, 5, 1500, 1500, true)).toThrow(RangeError);
    expect(() => bladeCrossings(7.5, 5, 1500, 1500, true)).toThrow(RangeError);
  });

  it("steps blades round the circle", () => {
    expect(bladeAngles(4, -Math.PI / 4).map((a) => Math.round((a * 180) / Math.PI))).toEqual([315, 45, 135, 225]);
  });
});
