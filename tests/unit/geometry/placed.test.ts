import { describe, expect, it } from "vitest";
import { edgeReport } from "@/lib/science/geometry/edges";
import { meshBounds, signedVolume, type Mesh } from "@/lib/science/geometry/mesh";
import { placed } from "@/lib/science/geometry/placed";
import { generateRotor } from "@/lib/science/geometry/rotor-generator";
import { boxMesh, together, withoutTriangles } from "../../factories/rotor-mesh";

const spec = { blades: 5, hand: "right", helixPitchMm: 90, chordMm: 25, thicknessMm: 2 } as const;
const rotor = generateRotor({
  ...{ ...spec, hubRadiusMm: 20, tipRadiusMm: 57, hubDepthMm: 18 },
  bladeSteps: { span: 60, chord: 60 },
});

/** Triangles and vertices in a seeded random order (Park & Miller's generator, CACM 1988). */
function shuffled(mesh: Mesh): Mesh {
  let seed = 12_345;
  const order = (count: number): number[] => {
    const out = Array.from({ length: count }, (_, i) => i);
    for (let i = count - 1; i > 0; i--) {
      seed = (16_807 * seed) % 2_147_483_647;
      const other = seed % (i + 1);
      [out[i], out[other]] = [out[other] ?? 0, out[i] ?? 0];
    }
    return out;
  };
  const number = order(mesh.positions.length / 3);
  const positions = new Float64Array(mesh.positions.length);
  number.forEach((to, v) => positions.set(mesh.positions.subarray(3 * v, 3 * v + 3), 3 * to));
  const triangles = order(mesh.triangles.length / 3).flatMap((t) =>
    [0, 1, 2].map((corner) => number[mesh.triangles[3 * t + corner] ?? 0] ?? 0),
  );
  return { positions, triangles: Uint32Array.from(triangles) };
}

/** Every triangle by its corners' positions, whatever the numbers. */
const facesOf = ({ positions, triangles }: Mesh): string[] =>
  Array.from({ length: triangles.length / 3 }, (_, t) =>
    Array.from(triangles.subarray(3 * t, 3 * t + 3), (v) => positions.subarray(3 * v, 3 * v + 3).join()).join(";"),
  ).sort();

describe("a scattered mesh is put in order of place", () => {
  const scattered = shuffled(withoutTriangles(rotor, [7, 5000]));
  const ordered = placed(scattered);

  it("with the same triangles, turned the same way", () => {
    expect(facesOf(ordered)).toEqual(facesOf(scattered));
  });

  it("so that corners lie near each other", () => {
    const apart = ({ triangles, positions }: Mesh): number =>
      triangles.reduce((sum, v, i) => (i % 3 === 0 ? sum : sum + Math.abs(v - (triangles[i - 1] ?? 0))), 0) /
      (triangles.length * positions.length);
    expect(apart(ordered)).toBeLessThan(0.1 * apart(scattered));
  });

  it("and nothing that is judged changes", () => {
    const judged = (mesh: Mesh) => {
      const { openEdges, misorientedEdges, shellCount, edges } = edgeReport(mesh);
      return { openEdges, misorientedEdges, shellCount, edges };
    };
    expect(judged(ordered)).toEqual(judged(scattered));
    expect(judged(ordered).openEdges).toBe(6);
    expect(Math.abs(signedVolume(placed(shuffled(rotor))) / signedVolume(rotor) - 1)).toBeLessThan(1e-12);
  });

  it("while one that lies in order stays as it is", () => {
    expect(placed(rotor)).toBe(rotor);
  });
});

describe("bounds and volume", () => {
  it("of a box of 3 × 4 × 5 mm, whatever vertices no triangle uses", () => {
    const box = boxMesh([1, -2, 3], [3, 4, 5]);
    const stray: Mesh = { positions: Float64Array.of(99, 99, 99), triangles: new Uint32Array() };
    const both = together(stray, box);
    expect(meshBounds(both)).toEqual({ min: [1, -2, 3], max: [4, 2, 8] });
    expect(signedVolume(both)).toBeCloseTo(60, 9);
  });
});
