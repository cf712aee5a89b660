import { describe, expect, it, vi } from "vitest";
import { analyseMesh } from "@/lib/science/geometry/analyse";
import type { Mesh, Vec3 } from "@/lib/science/geometry/mesh";
import { generateRotor, type RotorSpec } from "@/lib/science/geometry/rotor-generator";
import { boxMesh, meshOf, moved, together, tubeMesh } from "../../factories/rotor-mesh";

// Every rotor is searched on some hundred thousand lines; a busy machine takes its time.
vi.setConfig({ testTimeout: 180_000 });

// Expected: what each model was made of, by its own numbers.
const spec: RotorSpec = {
  ...{ blades: 7, hand: "right", helixPitchMm: 100, chordMm: 22, thicknessMm: 1.6 },
  ...{ hubRadiusMm: 20, tipRadiusMm: 57, hubDepthMm: 18, facets: 72 },
};

/** Copies of a mesh, turned evenly about z. */
const around = (count: number, mesh: Mesh): Mesh[] =>
  Array.from({ length: count }, (_, k) => moved(mesh, [0, 0, 1], (2 * Math.PI * k) / count, [0, 0, 0]));

const codesOf = ({ warnings }: ReturnType<typeof analyseMesh>): string[] => warnings.map(({ code }) => code);

function expectRead(mesh: Mesh, wanted: { blades?: number; hubMm?: number; tipMm?: number; sweptMm?: number }): void {
  const found = analyseMesh(mesh);
  const [rotor] = found.rotors;
  expect(found.rotors.map((r) => [r.blades, r.hand])).toEqual([[wanted.blades ?? 7, "right"]]);
  expect(Math.abs((rotor?.hubDiameterMm ?? NaN) - (wanted.hubMm ?? 40))).toBeLessThan(0.1);
  expect(Math.abs((rotor?.tipDiameterMm ?? NaN) - (wanted.tipMm ?? 114))).toBeLessThan(0.1);
  expect(Math.abs((rotor?.sweptDiameterMm ?? NaN) - (wanted.sweptMm ?? wanted.tipMm ?? 114))).toBeLessThan(0.1);
  expect(rotor?.confidence).toBeGreaterThan(0.9);
}

describe("unusual rotors", () => {
  it("a ring that is taller than the blades is swept all the same", () => {
    const ring = { thicknessMm: 2, depthMm: 26 };
    // The generator's ring bites half a millimetre into the blades.
    expectRead(generateRotor({ ...spec, shroud: ring }), { tipMm: 113, sweptMm: 118 });
  });

  it("the hub on spokes is the ring that carries the blades, not the boss inside it", () => {
    const spokes = around(5, boxMesh([5, -1.2, -3], [13, 2.4, 6]));
    const hub = generateRotor({ ...spec, boreRadiusMm: 16 });
    expectRead(together(hub, tubeMesh(2.5, 6, -9, 9, 40), ...spokes), {});
  });

  it("a ring at part span is no hub", () => {
    expectRead(together(generateRotor(spec), tubeMesh(40, 41.2, -2, 2, 96)), {});
  });

  it.each([8, 12, 16])("a hub of %i facets and blades of few triangles stand on their axis", (facets) => {
    const mesh = generateRotor({ ...spec, facets, bladeSteps: { span: 2, chord: 1 } });
    const shifted = moved(mesh, [0, 0, 1], 0.3, [12, -7, 0]);
    expectRead(shifted, {});
    const [x = NaN, y = NaN] = analyseMesh(shifted).axis?.pointMm ?? [];
    expect(Math.hypot(x - 12, y + 7)).toBeLessThan(0.01);
  });

  it("a crumb far off is told, and hides nothing", () => {
    const file = together(generateRotor(spec), boxMesh([300, 0, 0], [0.5, 0.5, 0.5]));
    expectRead(file, {});
    const found = analyseMesh(file);
    expect(codesOf(found)).toContain("crumbs");
    expect(found.boundsMm.max[0]).toBe(300.5);
  });

  it("vanes in a duct around the rotor stand still", () => {
    const vanes = generateRotor({
      ...{ ...spec, blades: 11, hand: "left", middleZMm: -20, hubRadiusMm: 14, tipRadiusMm: 58.5, hubDepthMm: 12 },
      ...{ helixPitchMm: 400, chordMm: 13 },
    });
    expectRead(together(generateRotor(spec), vanes, tubeMesh(58, 60, -30, 12, 120)), {});
  });

  it("blades of two lengths: the long ones count, and a person is asked", () => {
    const short = Array.from({ length: 5 }, (_, k) => (2 * Math.PI * (k + 0.5)) / 5);
    const found = analyseMesh(
      together(
        generateRotor({ ...spec, blades: 5 }),
        generateRotor({ ...spec, blades: 5, anglesRad: short, tipRadiusMm: 40, chordMm: 14 }),
      ),
    );
    expect(found.rotors.map((r) => r.blades)).toEqual([5]);
    expect(found.warnings.find(({ code }) => code === "rotor-unsure")?.message).toContain("showed 10 blades");
  });
});

/** A toothed wheel, each layer turned on from the one below. */
function gear(teeth: number, rootMm: number, tipMm: number, turnRad: number): Mesh {
  const layers = 9;
  const ring = Array.from({ length: teeth }, (_, k) =>
    [0, 0.25, 0.35, 0.65, 0.75].map((f): [number, number] => [
      (k + f) / teeth,
      f === 0.35 || f === 0.65 ? tipMm : rootMm,
    ]),
  ).flat();
  const n = ring.length;
  const vertices = Array.from({ length: layers }, (_, layer) =>
    ring.map(([turn, r]) => {
      const angle = 2 * Math.PI * turn + (turnRad * layer) / (layers - 1);
      return [r * Math.cos(angle), r * Math.sin(angle), 2 * layer];
    }),
  ).flat();
  const faces = Array.from({ length: n }, (_, i) => {
    const j = (i + 1) % n;
    const walls = Array.from({ length: layers - 1 }, (_layer, l) => [
      [l * n + i, l * n + j, (l + 1) * n + j],
      [l * n + i, (l + 1) * n + j, (l + 1) * n + i],
    ]).flat();
    return [...walls, [layers * n, j, i], [layers * n + 1, (layers - 1) * n + i, (layers - 1) * n + j]];
  }).flat();
  return meshOf([...vertices, [0, 0, 0], [0, 0, 2 * (layers - 1)]], faces);
}

describe("no axial rotor is seen in", () => {
  const plate: Mesh = moved(boxMesh([18, -11, -0.8], [39, 22, 1.6]), [1, 0, 0], 0.6, [0, 0, 0]);
  const tilt: Vec3 = [0.36, 0.48, 0.8];
  const wheel = (...spokes: Mesh[]): Mesh => together(tubeMesh(3, 10, -8, 8, 48), ...spokes);
  it.each<[string, Mesh]>([
    ["one blade", moved(plate, tilt, 1, [3, 4, 5])],
    ["blades without a hub", together(...around(5, plate))],
    ["two rotors side by side", together(...[-60, 60].map((x) => moved(generateRotor(spec), [0, 0, 1], 0, [x, 0, 0])))],
    ["a gear", gear(20, 35, 40, 0)],
    ["a helical gear", gear(20, 35, 40, 0.3)],
    ["a wheel", together(wheel(...around(5, boxMesh([9, -1.5, -6], [37, 3, 12]))), tubeMesh(45, 50, -8, 8, 96))],
    ["paddles across", wheel(...around(6, boxMesh([9, -1, -7], [40, 2, 14])))],
    ["a radial impeller", wheel(...around(9, boxMesh([9, -1, -7], [40, 2, 14])), tubeMesh(2, 50, -9, -6.5, 96))],
  ])("%s", (_, mesh) => {
    const found = analyseMesh(mesh);
    expect(found.rotors).toEqual([]);
    expect(codesOf(found)).toContain("no-rotor");
  });
});
