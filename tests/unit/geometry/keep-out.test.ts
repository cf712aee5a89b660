import { describe, expect, it } from "vitest";
import { analyseMesh } from "@/lib/science/geometry/analyse";
import { placeBeforeCooler } from "@/lib/science/geometry/fit/cooler-place";
import { boxAsMesh, compareWithKeepOuts, type KeepOut } from "@/lib/science/geometry/fit/keep-out";
import { isInside, meshCloseness } from "@/lib/science/geometry/fit/mesh-clearance";
import { reachIntoBox } from "@/lib/science/geometry/fit/reach-into-box";
import { sweptMesh, sweptProfile } from "@/lib/science/geometry/fit/swept-volume";
import { triangleCloseness } from "@/lib/science/geometry/fit/triangle-distance";
import { triangleTree } from "@/lib/science/geometry/fit/triangle-tree";
import type { Mesh, Vec3 } from "@/lib/science/geometry/mesh";
import { generateRotor, type RotorSpec } from "@/lib/science/geometry/rotor-generator";

/** The figures here are elementary geometry: distances that can be read off the coordinates. */
const box = (min: Vec3, max: Vec3) => ({ min, max });
const boxKeepOut = (name: string, min: Vec3, max: Vec3): KeepOut => ({ name, shape: "box", box: box(min, max) });
const treeOf = (min: Vec3, max: Vec3) => triangleTree(boxAsMesh(box(min, max)));

const spec: RotorSpec = {
  blades: 7,
  hand: "right",
  helixPitchMm: 90,
  chordMm: 26,
  thicknessMm: 2,
  hubRadiusMm: 20,
  tipRadiusMm: 56,
  hubDepthMm: 24,
};

describe("how close two bodies come", () => {
  it("tells face to face, edge to edge and corner to corner apart", () => {
    const cube = treeOf([0, 0, 0], [10, 10, 10]);
    expect(meshCloseness(cube, treeOf([13, 2, 2], [20, 8, 8]))?.distanceMm).toBeCloseTo(3, 2);
    expect(meshCloseness(cube, treeOf([13, 14, 2], [20, 20, 8]))?.distanceMm).toBeCloseTo(5, 2);
    expect(meshCloseness(cube, treeOf([12, 13, 16], [20, 20, 20]))?.distanceMm).toBeCloseTo(7, 2);
  });

  it("says 0 where a triangle crosses with no corner inside", () => {
    const needle: Mesh = {
      positions: Float64Array.from([-50, 5, 5, 60, 5, 5, 5, 80, 5]),
      triangles: Uint32Array.from([0, 1, 2]),
    };
    expect(meshCloseness(triangleTree(needle), treeOf([0, 0, 0], [10, 10, 10]))?.distanceMm).toBe(0);
    // From −x it comes through to the far side; from −y it is in from 5 mm on, so 5 mm deep from +y.
    const reach = reachIntoBox(needle, box([0, 0, 0], [10, 10, 10]));
    expect(reach?.[0]).toBeCloseTo(10, 12);
    expect(reach?.[3]).toBeCloseTo(5, 12);
  });

  it("says 0 for a body wholly inside another, and knows inside from outside", () => {
    const outer = treeOf([-20, -20, -20], [20, 20, 20]);
    expect(meshCloseness(outer, treeOf([-1, -1, -1], [1, 1, 1]))?.distanceMm).toBe(0);
    expect(isInside(outer, [19.9, 0, 0])).toBe(true);
    expect(isInside(outer, [20.1, 0, 0])).toBe(false);
  });

  it("finds two skew edges between which no corner is nearest", () => {
    const a: [Vec3, Vec3, Vec3] = [
      [-10, 0, 0],
      [10, 0, 0],
      [0, 0, -10],
    ];
    const b: [Vec3, Vec3, Vec3] = [
      [0, -10, 4],
      [0, 10, 4],
      [0, 0, 14],
    ];
    expect(triangleCloseness(a, b).distanceMm).toBeCloseTo(4, 12);
  });

  it("has nothing to say about a mesh without triangles", () => {
    const none = triangleTree({ positions: new Float64Array(), triangles: new Uint32Array() });
    expect(meshCloseness(none, treeOf([0, 0, 0], [1, 1, 1]))).toBeUndefined();
  });
});

describe("what a rotor sweeps", () => {
  const mesh = generateRotor(spec);
  const zone = { sweptDiameterMm: 112, fromMm: -12, toMm: 12 };

  it("reaches the tip and holds every corner of the mesh", () => {
    const profile = sweptProfile(mesh, zone);
    expect(Math.max(...profile.radiiMm)).toBeCloseTo(56, 6);
    const slab = (z: number) =>
      Math.min(profile.radiiMm.length - 1, Math.max(0, Math.floor(((z + 12) / 24) * profile.radiiMm.length)));
    for (let v = 0; v < mesh.positions.length; v += 3) {
      const [x = 0, y = 0, z = 0] = mesh.positions.slice(v, v + 3);
      if (Math.abs(z) > 12) continue;
      expect(Math.hypot(x, y)).toBeLessThanOrEqual((profile.radiiMm[slab(z)] ?? 0) + 1e-6);
    }
  });

  it("leaves out what stands further out than the rotor reaches", () => {
    const frame = boxAsMesh(box([58, -5, -5], [62, 5, 5]));
    expect(Math.max(...sweptProfile(frame, zone).radiiMm)).toBe(0);
  });

  it("is a little wider than the circle, never narrower", () => {
    const swept = sweptMesh(sweptProfile(mesh, zone));
    const solid = triangleTree(swept);
    for (let k = 0; k < 5; k++) {
      const angle = 1.2571 * k;
      const post: Vec3 = [56.2 * Math.cos(angle), 56.2 * Math.sin(angle), 0];
      const point = triangleTree(boxAsMesh(box(post, [post[0] + 1e-6, post[1] + 1e-6, 1e-6])));
      const distance = meshCloseness(solid, point)?.distanceMm ?? NaN;
      expect(distance).toBeLessThan(0.2 + 1e-6);
      expect(distance).toBeGreaterThan(0.15);
    }
  });
});

describe("a model before the cooler", () => {
  const analysis = analyseMesh(generateRotor(spec));
  const { axis } = analysis;
  if (!axis) throw new Error("the generator makes a rotor");
  const placed = (turned: boolean) =>
    placeBeforeCooler({ mesh: analysis.mesh, axis, rotors: analysis.rotors }, 25, turned);

  it("stands in the middle of its frame, either way round", () => {
    for (const turned of [false, true]) {
      const [zone] = placed(turned).zones;
      expect(((zone?.fromMm ?? 0) + (zone?.toMm ?? 0)) / 2).toBeCloseTo(12.5, 3);
    }
  });

  it("clears a wall beside the blades by the gap, whichever blade points at it", () => {
    // At 59 mm from the axis the swept circle of 56 mm leaves 3 mm, though between two blades the model leaves more.
    for (const side of [
      boxKeepOut("wall", [59, -30, 0], [70, 30, 25]),
      boxKeepOut("wall", [-30, -70, 0], [30, -59, 25]),
    ]) {
      const [result] = compareWithKeepOuts(placed(false), [side]);
      expect(result?.meets).toBe(false);
      expect(result?.clearanceMm).toBeCloseTo(3, 1);
      expect(result?.by).toBe("what the rotor sweeps");
    }
  });

  it("says how deep it reaches into a box and from where", () => {
    const [result] = compareWithKeepOuts(placed(false), [boxKeepOut("Memory", [54, -40, 0], [70, 40, 25])]);
    expect(result?.meets).toBe(true);
    // 56 mm of tip in a box that begins at 54 mm: 2 mm, and the hundredths that the swept body is too wide.
    expect(result?.change).toMatch(/reaches 2\.[01] mm into Memory from its −x side/);
  });

  it("takes a keep-out that is a mesh", () => {
    const wall: KeepOut = { name: "cover", shape: "mesh", mesh: boxAsMesh(box([59, -30, 0], [70, 30, 25])) };
    expect(compareWithKeepOuts(placed(true), [wall])[0]?.clearanceMm).toBeCloseTo(3, 1);
  });
});
