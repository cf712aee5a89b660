import { describe, expect, it } from "vitest";
import { readingChanges } from "@/lib/domain/designs/reading-changes";

const reading = {
  stages: 1,
  massG: null,
  rotors: [{ blades: 7, hand: "left", tipDiameterMm: 112.4 }],
  warnings: [{ code: "open-edges", message: "There are 3." }],
};

describe("what changed between two readings of a file", () => {
  it("is nothing where only last digits and words of warnings differ", () => {
    const again = structuredClone(reading);
    again.rotors[0] = { blades: 7, hand: "left", tipDiameterMm: 112.4 * (1 + 1e-12) };
    again.warnings[0] = { code: "open-edges", message: "Three edges are open." };
    expect(readingChanges(reading, again)).toEqual([]);
  });

  it("names each figure with its place, also what is new or gone", () => {
    const again = {
      ...{ stages: 2, massG: 31.5, warnings: [] },
      rotors: [
        { blades: 9, hand: "left", tipDiameterMm: 112.4 },
        { blades: 5, hand: "right", tipDiameterMm: 100 },
      ],
    };
    expect(readingChanges(reading, again)).toEqual([
      { path: "massG", before: null, after: 31.5 },
      { path: "rotors[0].blades", before: 7, after: 9 },
      { path: "rotors[1].blades", before: undefined, after: 5 },
      { path: "rotors[1].hand", before: undefined, after: "right" },
      { path: "rotors[1].tipDiameterMm", before: undefined, after: 100 },
      { path: "stages", before: 1, after: 2 },
      { path: "warnings[0].code", before: "open-edges", after: undefined },
    ]);
  });
});
