import { describe, expect, it, vi } from "vitest";
import { analyseMesh } from "@/lib/science/geometry/analyse";
import { edgeReport } from "@/lib/science/geometry/edges";
import { massProperties, shellIntegrals } from "@/lib/science/geometry/mass-properties";
import type { Mesh, Vec3 } from "@/lib/science/geometry/mesh";
import { occupancyHarmonic, strongestOrder } from "@/lib/science/geometry/occupancy";
import { boxMesh, meshOf, moved, tubeMesh } from "../../factories/rotor-mesh";
import { expectClose, idsOf, num, nums, rows, vector, type Vector } from "../support/vectors";

// Every rotor is searched on some hundred thousand lines; a busy machine takes its time.
vi.setConfig({ testTimeout: 180_000 });

function properties(mesh: Mesh, origin: Vec3 = [0, 0, 0]) {
  const edges = edgeReport(mesh);
  const { integrals, areasMm2 } = shellIntegrals(mesh, edges.shellOf, edges.shellCount, origin);
  const [solid] = integrals;
  if (!solid) throw new Error("a solid was expected");
  // Density 1 g/mm³, as in the check values.
  const mass = massProperties(solid, 1000);
  const vertices = mesh.positions.length / 3;
  const faces = mesh.triangles.length / 3;
  return {
    solid,
    edges,
    area: areasMm2[0],
    centroid: mass?.centreMm,
    inertia: mass?.inertiaGmm2,
    V: vertices,
    E: edges.edges,
    F: faces,
    euler: vertices - edges.edges + faces,
  };
}

function prism(n: number, r: number, h: number): Mesh {
  const ring = Array.from({ length: n }, (_, k) => [
    r * Math.cos((2 * Math.PI * k) / n),
    r * Math.sin((2 * Math.PI * k) / n),
  ]);
  const vertices = [0, h].flatMap((z) => ring.map(([x = 0, y = 0]) => [x, y, z]));
  const faces: number[][] = [];
  for (let k = 0; k < n; k++) {
    const m = (k + 1) % n;
    faces.push([k, m, n + m], [k, n + m, n + k]);
    if (k > 0 && k < n - 1) faces.push([0, k + 1, k], [n, n + k, n + k + 1]);
  }
  return meshOf(vertices, faces);
}

function cone(n: number, r: number, h: number): Mesh {
  const ring = Array.from({ length: n }, (_, k) => [
    r * Math.cos((2 * Math.PI * k) / n),
    r * Math.sin((2 * Math.PI * k) / n),
    0,
  ]);
  const faces = ring.flatMap((_, k) => [
    [k, (k + 1) % n, n],
    [(k + 1) % n, k, n + 1],
  ]);
  return meshOf([...ring, [0, 0, h], [0, 0, 0]], faces);
}

function torus(nu: number, nv: number, R: number, r: number): Mesh {
  const vertices: number[][] = [];
  const faces: number[][] = [];
  const id = (i: number, j: number) => (i % nu) * nv + (j % nv);
  for (let i = 0; i < nu; i++) {
    for (let j = 0; j < nv; j++) {
      const [u, v] = [(2 * Math.PI * i) / nu, (2 * Math.PI * j) / nv];
      vertices.push([(R + r * Math.cos(v)) * Math.cos(u), (R + r * Math.cos(v)) * Math.sin(u), r * Math.sin(v)]);
      faces.push([id(i, j), id(i + 1, j), id(i + 1, j + 1)], [id(i, j), id(i + 1, j + 1), id(i, j + 1)]);
    }
  }
  return meshOf(vertices, faces);
}

function compute(id: string, v: Vector): unknown {
  const n = (key: string) => num(v.inputs[key]);
  const given = () => meshOf(rows(v.inputs["vertices"]), rows(v.inputs["faces"]));
  switch (id) {
    case "T8-01": {
      const [x = 0, y = 0, z = 0] = nums(v.inputs["origin"]);
      const [dx = 0, dy = 0, dz = 0] = nums(v.inputs["size"]);
      const p = properties(boxMesh([x, y, z], [dx, dy, dz]));
      const [Ixx, Iyy, Izz] = p.inertia ?? [];
      return { ...p, volume: p.solid.volumeMm3, Ixx, Iyy, Izz };
    }
    case "T8-02": {
      const p = properties(given());
      const [xx, yy, zz, xy, yz, zx] = p.inertia ?? [];
      // Off-diagonals are the negative products of inertia.
      const I = [
        [xx, xy, zx],
        [xy, yy, yz],
        [zx, yz, zz],
      ];
      return { ...p, volume: p.solid.volumeMm3, I };
    }
    case "T8-03": {
      const p = properties(given());
      const { watertight } = analyseMesh(given());
      const counts = { misoriented_edges: p.edges.misorientedEdges, boundary_edges: p.edges.openEdges };
      return { volume: p.solid.volumeMm3, ...counts, watertight };
    }
    case "T8-04": {
      const p = properties(given());
      const shift = nums(v.inputs["second_copy_shift"]);
      const shifted = moved(given(), [0, 0, 1], 0, [shift[0] ?? 0, shift[1] ?? 0, shift[2] ?? 0]);
      const { watertight, volumeMm3 } = analyseMesh(given());
      expect(volumeMm3).toBeNull();
      return {
        volume_at_origin: p.solid.volumeMm3,
        volume_shifted: properties(shifted).solid.volumeMm3,
        boundary_edges: p.edges.openEdges,
        euler: p.euler,
        watertight,
      };
    }
    case "T8-08": {
      const p = properties(cone(n("n"), n("r"), n("h")));
      const [Ixx, , Izz] = p.inertia ?? [];
      const true_cone_volume = (Math.PI * n("r") ** 2 * n("h")) / 3;
      return { volume: p.solid.volumeMm3, centroid: p.centroid, Ixx, Izz, true_cone_volume, euler: p.euler };
    }
    case "T8-09": {
      const p = properties(torus(n("nu"), n("nv"), n("R"), n("r")));
      const [Ixx, , Izz] = p.inertia ?? [];
      const true_volume = 2 * Math.PI ** 2 * n("R") * n("r") ** 2;
      const ratio = p.solid.volumeMm3 / true_volume;
      return { ...p, volume: p.solid.volumeMm3, true_volume, ratio, Ixx, Izz, genus: 1 - p.euler / 2 };
    }
    case "T8-10": {
      const solid = Array.from({ length: n("N") }, () => false);
      for (const start of nums(v.inputs["pulse_starts"])) solid.fill(true, start, start + n("pulse_len"));
      const orders = ["0", "1", "3", "9", "18", "27", "36"];
      const abs_F_over_N = Object.fromEntries(orders.map((m) => [m, occupancyHarmonic(solid, Number(m))]));
      return { abs_F_over_N, blade_count: strongestOrder(solid, 60) };
    }
    default: {
      const p = properties(prism(n("n"), n("r"), n("h")));
      const [Ixx, , Izz] = p.inertia ?? [];
      const chord_error = n("r") * (1 - Math.cos(Math.PI / n("n")));
      return {
        volume: p.solid.volumeMm3,
        Izz,
        Ixx,
        ratio_to_cylinder: p.solid.volumeMm3 / (Math.PI * n("r") ** 2 * n("h")),
        chord_error,
        predicted_rel_error_4eps_3r: (4 * chord_error) / (3 * n("r")),
      };
    }
  }
}

const ids = idsOf("T8-").filter((id) => id <= "T8-10");

describe("mass properties and validity agree with closed forms (Zhang & Chen; Eberly; sources in the titles)", () => {
  it.each(ids.map((id) => [vector(id).title, id]))("%s", (_, id) => {
    const v = vector(id);
    const found = compute(id, v) as { centroid?: readonly number[] };
    // A centroid of 0 has no relative tolerance.
    if (id === "T8-08") found.centroid = found.centroid?.map((value) => (Math.abs(value) < 1e-9 ? 0 : value));
    expectClose(found, v.expected, v.tolerance);
  });
});

describe("closed forms through the whole analysis", () => {
  // Solid of a tube of n facets: n/2 sin(2π/n) (R² − r²) h, elementary geometry.
  it.each([
    [3, 10, 64, [0, 0, 0], 0],
    [0, 30, 96, [500, -300, 1000], 0.7],
    [25, 60, 48, [-10_000, 20_000, 5000], 2.1],
  ] as const)(
    "a tube %i/%i of %i facets shifted by %o keeps its volume to 1e-9",
    (inner, outer, facets, shift, angle) => {
      const mesh =
        inner > 0 ? tubeMesh(inner, outer, -4, 9, facets) : moved(prism(facets, outer, 13), [0, 0, 1], 0, [0, 0, -4]);
      const found = analyseMesh(moved(mesh, [0.6, 0, 0.8], angle, shift));
      const wanted = (facets / 2) * Math.sin((2 * Math.PI) / facets) * (outer ** 2 - inner ** 2) * 13;
      expect(Math.abs((found.volumeMm3 ?? NaN) / wanted - 1)).toBeLessThan(1e-9);
      expect(found.rotors).toEqual([]);
      expect(found.axis).toBeNull();
    },
  );
});
