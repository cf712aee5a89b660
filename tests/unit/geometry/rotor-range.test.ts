import { describe, expect, it, vi } from "vitest";
import { analyseMesh } from "@/lib/science/geometry/analyse";
import type { Vec3 } from "@/lib/science/geometry/mesh";
import { generateRotor, generateRotors, type RotorSpec } from "@/lib/science/geometry/rotor-generator";
import { boxMesh, moved, together, tubeMesh } from "../../factories/rotor-mesh";

// Every rotor is searched on some hundred thousand lines; a busy machine takes its time.
vi.setConfig({ testTimeout: 180_000 });

/** A rotor of so many blades, of a size, solidity and hand that go with the number. */
function specOf(blades: number): RotorSpec {
  const tip = [38, 44, 57, 67][blades % 4] ?? 57;
  return {
    blades,
    hand: blades % 2 === 0 ? "left" : "right",
    helixPitchMm: 1.2 * tip + 4 * blades,
    chordMm: Math.min(((2 * Math.PI * tip) / blades) * 0.7, 0.7 * tip),
    thicknessMm: 1.6,
    camber: blades % 3 === 0 ? 0.06 : 0,
    sweepRad: blades % 5 === 0 ? 0.3 : 0,
    hubRadiusMm: (0.3 + 0.01 * (blades % 7)) * tip,
    tipRadiusMm: tip,
    hubDepthMm: 18,
    boreRadiusMm: blades % 2 === 0 ? 2.5 : 0,
    facets: 40 + 3 * blades,
    ...(blades % 6 === 1 && { shroud: { thicknessMm: 1.5, depthMm: 10 } }),
  };
}

function expectAsMade(spec: RotorSpec, found: ReturnType<typeof analyseMesh>["rotors"][number] | undefined): void {
  expect([found?.blades, found?.hand, found?.shroud]).toEqual([spec.blades, spec.hand, spec.shroud !== undefined]);
  expect(Math.abs((found?.hubDiameterMm ?? NaN) - 2 * spec.hubRadiusMm)).toBeLessThan(0.1);
  // The generator's ring bites half a millimetre into the blades, so they are seen up to there.
  const tip = 2 * spec.tipRadiusMm - (spec.shroud ? 1 : 0);
  expect(Math.abs((found?.tipDiameterMm ?? NaN) - tip)).toBeLessThan(0.1);
  const swept = 2 * (spec.tipRadiusMm + (spec.shroud?.thicknessMm ?? 0));
  expect(Math.abs((found?.sweptDiameterMm ?? NaN) - swept)).toBeLessThan(0.1);
  expect(found?.confidence).toBeGreaterThan(0.9);
}

describe("rotors of the demo's generator are read as they were made", () => {
  it.each(Array.from({ length: 18 }, (_, i) => i + 2))("%i blades", (blades) => {
    const spec = specOf(blades);
    const turn: Vec3 = [0.36, 0.48, 0.8];
    const found = analyseMesh(moved(generateRotor(spec), turn, 0.2 * blades, [blades, -3 * blades, 50]));
    expect(found.rotors).toHaveLength(1);
    expectAsMade(spec, found.rotors[0]);
    // The middle of the rotor stays on the axis, wherever it was shifted.
    const [x, y, z] = found.axis?.pointMm ?? [NaN, NaN, NaN];
    const [dx, dy, dz] = found.axis?.direction ?? [NaN, NaN, NaN];
    const [px, py, pz] = [blades - x, -3 * blades - y, 50 - z];
    expect(Math.hypot(py * dz - pz * dy, pz * dx - px * dz, px * dy - py * dx)).toBeLessThan(0.01);
    expect(Math.max(dx, dy, dz)).toBe(Math.max(Math.abs(dx), Math.abs(dy), Math.abs(dz)));
  });

  it("two rotors turn against each other inside a frame with struts, in order along the axis", () => {
    const first: RotorSpec = {
      ...specOf(11),
      hand: "right",
      tipRadiusMm: 57,
      hubRadiusMm: 20,
      hubDepthMm: 16,
      chordMm: 20,
      helixPitchMm: 90,
      middleZMm: -16,
      facets: 72,
    };
    const second: RotorSpec = { ...first, blades: 7, hand: "left", middleZMm: 16 };
    const sides = [0, 1, 2, 3].map((k) =>
      moved(boxMesh([58.4, -60, -30], [1.6, 120, 60]), [0, 0, 1], (k * Math.PI) / 2, [0, 0, 0]),
    );
    const struts = [0, 1, 2].map((k) =>
      moved(boxMesh([15, -2, -1.5], [44, 4, 3]), [0, 0, 1], (k * 2 * Math.PI) / 3, [0, 0, 0]),
    );
    const file = together(generateRotors([first, second]), ...sides, ...struts, tubeMesh(2, 18, -1.5, 1.5, 48));
    const found = analyseMesh(file);
    expect([found.stages, found.rotors.length]).toEqual([2, 2]);
    expectAsMade(first, found.rotors[0]);
    expectAsMade(second, found.rotors[1]);
    expect(found.struts).toBe(3);
    expect(found.spacingsMm[0]).toBeCloseTo(16, 0);
  });

  it("unequal spacing is counted, said, and makes the unbalance that a sum over blades gives", () => {
    const anglesRad = [0, 0.8, 1.75, 2.6, 3.55, 4.45, 5.3];
    const spec: RotorSpec = { ...specOf(8), blades: 7, anglesRad, camber: 0 };
    const found = analyseMesh(generateRotor(spec));
    expect(found.rotors[0]?.blades).toBe(7);
    expect(found.warnings.map((warning) => warning.code)).toContain("unequal-spacing");
    // By hand: one blade's own unbalance times the length of the sum of unit vectors along the blades.
    const alone = analyseMesh(generateRotor({ ...spec, blades: 2, anglesRad: [0, Math.PI / 2] }));
    const one = (alone.rotors[0]?.staticUnbalanceGmm ?? NaN) / Math.SQRT2;
    const sum = Math.hypot(
      anglesRad.reduce((s, a) => s + Math.cos(a), 0),
      anglesRad.reduce((s, a) => s + Math.sin(a), 0),
    );
    expect(Math.abs((found.rotors[0]?.staticUnbalanceGmm ?? NaN) / (one * sum) - 1)).toBeLessThan(0.02);
  });
});
