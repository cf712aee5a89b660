import { describe, expect, it, vi } from "vitest";
import { analyseMesh } from "@/lib/science/geometry/analyse";
import type { Mesh } from "@/lib/science/geometry/mesh";
import { generateRotor, generateRotors, type RotorSpec } from "@/lib/science/geometry/rotor-generator";
import { boxMesh, moved, revolvedMesh, together, tubeMesh } from "../../factories/rotor-mesh";

vi.setConfig({ testTimeout: 180_000 });

// Expected throughout: what the meshes were constructed with. Profiles are closed forms: a line, a quarter ellipse.
const rotor: RotorSpec = {
  blades: 7,
  hand: "right",
  helixPitchMm: 110,
  chordMm: 22,
  thicknessMm: 2,
  hubRadiusMm: 20,
  tipRadiusMm: 55,
  hubDepthMm: 22,
};
const STEPS = 24;

/** A wall of 2 mm about z from the inside radius at each share t of the length (0 next to the rotors), upwards or downwards. */
function duct(insideMm: (t: number) => number, fromMm: number, lengthMm: number, up: boolean): Mesh {
  const at = (i: number, wall: number): [number, number] => {
    const t = i / STEPS;
    return [insideMm(t) + wall, up ? fromMm + t * lengthMm : fromMm - t * lengthMm];
  };
  const steps = Array.from({ length: STEPS + 1 }, (_, i) => i);
  const [inner, outer] = [steps.map((i) => at(i, 0)), steps.map((i) => at(i, 2))];
  return revolvedMesh(up ? [...outer, ...inner.reverse()] : [...inner, ...outer.reverse()], 160);
}

const bellmouth = (t: number): number => 57 + 16 * (1 - Math.sqrt(1 - t * t));
const cone = (t: number): number => 57 + 14 * t;

describe("an inlet stack in the file", () => {
  it.each([
    ["straight", () => 57, 26, true],
    ["straight", () => 57, 30, false],
    ["bellmouth", bellmouth, 24, true],
    ["bellmouth", bellmouth, 18, false],
    ["cone", cone, 20, true],
    ["cone", cone, 28, false],
    ["cone", (t: number) => 57 - 8 * t, 20, false],
  ] as const)("%s %#: kind and length, and the rotor as without it", (kind, inside, lengthMm, up) => {
    const stack = duct(inside, up ? 15 : -15, lengthMm, up);
    const { inletStack, spacer, rotors, watertight } = analyseMesh(together(generateRotor(rotor), stack));
    expect(watertight).toBe(true);
    expect(inletStack?.kind).toBe(kind);
    expect(inletStack?.lengthMm).toBeCloseTo(lengthMm, 3);
    expect(inletStack?.confidence).toBeGreaterThan(0.7);
    expect(spacer).toBeNull();
    expect(rotors).toHaveLength(1);
    expect(rotors[0]).toMatchObject({ blades: 7, hand: "right", shroud: false });
    expect(rotors[0]?.tipDiameterMm).toBeCloseTo(110, 1);
  });

  it("is found about a tilted, shifted axis too", () => {
    const whole = together(generateRotor(rotor), duct(bellmouth, 15, 24, true));
    const { inletStack } = analyseMesh(moved(whole, [0.6, 0.8, 0], 0.7, [30, -20, 11]));
    expect(inletStack?.kind).toBe("bellmouth");
    expect(inletStack?.lengthMm).toBeCloseTo(24, 2);
  });

  it("past both ends: the one that widens, half as sure", () => {
    const alone = analyseMesh(together(generateRotor(rotor), duct(cone, 15, 20, true))).inletStack;
    const { inletStack } = analyseMesh(
      together(
        generateRotor(rotor),
        duct(cone, 15, 20, true),
        duct(() => 57, -15, 30, false),
      ),
    );
    expect(inletStack?.kind).toBe("cone");
    expect(inletStack?.lengthMm).toBeCloseTo(20, 3);
    expect(inletStack?.confidence).toBeCloseTo((alone?.confidence ?? NaN) / 2, 6);
  });

  it("is not a housing around the rotor, nor a ring fixed to its tips, nor a square plate with a hole", () => {
    const housing = analyseMesh(together(generateRotor(rotor), tubeMesh(57, 60, -20, 20, 160)));
    expect([housing.inletStack, housing.spacer]).toEqual([null, null]);
    const ringed = analyseMesh(generateRotor({ ...rotor, shroud: { thicknessMm: 2, depthMm: 14 } }));
    expect([ringed.inletStack, ringed.rotors[0]?.shroud]).toEqual([null, true]);
    expect(analyseMesh(generateRotor(rotor)).inletStack).toBeNull();
    const bar = analyseMesh(together(generateRotor(rotor), boxMesh([-60, -4, 20], [120, 8, 6])));
    expect(bar.inletStack).toBeNull();
  });
});

describe("a spacer between two rotors", () => {
  const pair = generateRotors([
    { ...rotor, middleZMm: -25 },
    { ...rotor, blades: 5, hand: "left", middleZMm: 25 },
  ]);

  it("is read with its length, beside a stack of its own", () => {
    const { spacer, inletStack, rotors, spacingsMm } = analyseMesh(
      together(pair, tubeMesh(57, 61, -11, 11, 160), duct(bellmouth, 41, 20, true)),
    );
    expect(rotors.map(({ blades }) => blades)).toEqual([7, 5]);
    expect(spacer?.lengthMm).toBeCloseTo(22, 3);
    expect(spacer?.confidence).toBeGreaterThan(0.9);
    // Rotors reach 11 mm from their middles (hub) or farther (blades): the gap is the rotors', not the spacer's.
    expect(spacingsMm[0]).toBeLessThanOrEqual(28);
    expect(inletStack).toMatchObject({ kind: "bellmouth" });
    expect(inletStack?.lengthMm).toBeCloseTo(20, 3);
  });

  it("is none where the file has only a gap", () => {
    expect(analyseMesh(pair).spacer).toBeNull();
  });
});

describe("struts that stand still", () => {
  // Three bars from a boss to a tube, apart from the rotor: as a motor's mount in an inlet.
  const arms = Array.from({ length: 3 }, (_, k) =>
    moved(boxMesh([16, -1.5, 24], [42, 3, 6]), [0, 0, 1], (2 * Math.PI * k) / 3, [0, 0, 0]),
  );
  const mount = together(tubeMesh(0.5, 18, 22, 32, 96), tubeMesh(57, 60, 22, 32, 160), ...arms);

  it("are counted with a confidence; a mount with a boss is no duct", () => {
    const { struts, strutsConfidence, inletStack, rotors } = analyseMesh(together(generateRotor(rotor), mount));
    expect(rotors).toHaveLength(1);
    expect(struts).toBe(3);
    expect(strutsConfidence).toBeGreaterThan(0.9);
    expect(inletStack).toBeNull();
  });
});
