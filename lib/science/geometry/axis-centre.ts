import { median } from "@/lib/science/statistics/descriptive";
import { facesOf, type Faces } from "./faces";
import type { Mesh } from "./mesh";
import { bitCount } from "./wall-radius";
import { converge, inlierArea, normalLines, type NormalLines, type Point2 } from "./normal-lines";

/** Where the axis passes, and the area of the faces that may be of revolution about it, mm². */
export interface AxisCentre {
  readonly centre: Point2;
  readonly roundMm2: number;
}

const WALL_SLOPE_MAX = 0.05;
const SURFACE_SLOPE_MAX = 0.9;
/** A line passes through the centre within this share of the size. */
const CENTRED_WITHIN = 0.004;
const SECTORS = 12;
const SECTORS_NEEDED = 8;
/** Width of a group of radii and scale of the weights, both as shares of the size, step by step. */
const REFINEMENTS = [
  [0.012, 0.004],
  [0.006, 0.001],
  [0.003, 0.0003],
  [0.003, 0.00005],
  [0.003, 0.00001],
] as const;

/**
 * Where the rotation axis passes through x–y, for a mesh whose axis stands along z: the point that the normals of
 * walls pass through, found robustly (Cauchy weights, narrowed step by step, from several starts), then the common
 * centre of the circles on which their vertices lie, by least squares. So a heavy blade doesn't move it, as it would
 * the centroid. Without any round wall it is the middle of the surface.
 */
export function axisCentre(mesh: Mesh): AxisCentre {
  const faces = facesOf(mesh);
  const size = extent(mesh);
  const walls = normalLines(mesh, faces, WALL_SLOPE_MAX);
  const surfaces = normalLines(mesh, faces, SURFACE_SLOPE_MAX);
  const near = CENTRED_WITHIN * size;
  const starts = [surfaces.middle, boxMiddle(mesh)];
  const best = (lines: NormalLines): { centre: Point2; score: number } =>
    starts
      .map((start) => converge(lines, start, size))
      .map((centre) => ({ centre, score: inlierArea(lines, centre, near) }))
      .reduce((a, b) => (b.score > a.score ? b : a));
  const byWalls = best(walls);
  // Walls decide where they go around; otherwise every surface of revolution has a say.
  const rough = byWalls.score > 0.02 * surfaces.totalMm2 ? byWalls.centre : best(surfaces).centre;
  const centre = commonCentre(mesh, faces, rough, size) ?? rough;
  return { centre, roundMm2: inlierArea(surfaces, centre, near) };
}

function extent(mesh: Mesh): number {
  let most = 0;
  for (let i = 0; i < mesh.positions.length; i += 3) {
    most = Math.max(
      most,
      Math.hypot(
        (mesh.positions[i] ?? 0) - (mesh.positions[0] ?? 0),
        (mesh.positions[i + 1] ?? 0) - (mesh.positions[1] ?? 0),
      ),
    );
  }
  return most;
}

function boxMiddle(mesh: Mesh): Point2 {
  let [x0, x1, y0, y1] = [Infinity, -Infinity, Infinity, -Infinity];
  for (let i = 0; i < mesh.positions.length; i += 3) {
    const [x, y] = [mesh.positions[i] ?? 0, mesh.positions[i + 1] ?? 0];
    [x0, x1, y0, y1] = [Math.min(x0, x), Math.max(x1, x), Math.min(y0, y), Math.max(y1, y)];
  }
  return [(x0 + x1) / 2, (y0 + y1) / 2];
}

/** Common centre of all circles of wall vertices that go around; undefined where there is none. */
function commonCentre(mesh: Mesh, faces: Faces, start: Point2, size: number): Point2 | undefined {
  let centre = start;
  for (const [width, scale] of REFINEMENTS) {
    const circles = wallCircles(mesh, faces, centre, width * size);
    if (circles.length === 0) continue;
    for (let round = 0; round < 4; round++) centre = sharpened(circles, centre, scale * size);
  }
  if (wallCircles(mesh, faces, centre, 0.002 * size).length === 0) return undefined;
  return Math.hypot(centre[0] - start[0], centre[1] - start[1]) < 0.03 * size ? centre : start;
}

/**
 * One Gauss–Newton step towards the common centre of circles with radii of their own. Points off their circle by more
 * than `scale` hardly count: where blades cut a facet, vertices lie inside the circle of its corners.
 */
function sharpened(circles: readonly Point2[][], centre: Point2, scale: number): Point2 {
  let [xx, xy, yy, bx, by] = [0, 0, 0, 0, 0];
  for (const points of circles) {
    const far = Float64Array.from(points, ([x, y]) => Math.hypot(x - centre[0], y - centre[1]));
    const typical = median(far) ?? 0;
    const weights = new Float64Array(far.length);
    let [sum, mx, my, md] = [0, 0, 0, 0];
    for (const [i, [x, y]] of points.entries()) {
      const d = far[i] ?? 0;
      const off = (d - typical) / scale;
      const weight = 1 / (1 + off ** 2);
      weights[i] = weight;
      sum += weight;
      mx += weight * (d > 0 ? (x - centre[0]) / d : 0);
      my += weight * (d > 0 ? (y - centre[1]) / d : 0);
      md += weight * d;
    }
    for (const [i, [x, y]] of points.entries()) {
      const d = far[i] ?? 0;
      const weight = weights[i] ?? 0;
      const cx = (d > 0 ? (x - centre[0]) / d : 0) - mx / sum;
      const cy = (d > 0 ? (y - centre[1]) / d : 0) - my / sum;
      const cd = d - md / sum;
      xx += (weight * cx * cx) / sum;
      xy += (weight * cx * cy) / sum;
      yy += (weight * cy * cy) / sum;
      bx += (weight * cx * cd) / sum;
      by += (weight * cy * cd) / sum;
    }
  }
  const det = xx * yy - xy * xy;
  if (!(det > 0)) return centre;
  return [centre[0] + (bx * yy - by * xy) / det, centre[1] + (by * xx - bx * xy) / det];
}

/** Vertices of walls that face the centre, in groups of nearly equal radius that go most of the way around. */
function wallCircles(mesh: Mesh, faces: Faces, centre: Point2, width: number): Point2[][] {
  const { positions: p, triangles } = mesh;
  const corners = facingCorners(mesh, faces, centre);
  const radii = new Float64Array(corners.length);
  const sectors = new Map<number, number>();
  for (let i = 0; i < corners.length; i++) {
    const v = triangles[corners[i] ?? 0] ?? 0;
    const [dx, dy] = [(p[3 * v] ?? 0) - centre[0], (p[3 * v + 1] ?? 0) - centre[1]];
    const radius = Math.hypot(dx, dy);
    radii[i] = radius;
    const sector = 1 << (Math.floor((Math.atan2(dy, dx) / (2 * Math.PI) + 1) * SECTORS) % SECTORS);
    const [even, odd] = binsOf(radius, width);
    sectors.set(even, (sectors.get(even) ?? 0) | sector);
    sectors.set(odd, (sectors.get(odd) ?? 0) | sector);
  }
  // Most groups go only a little way around: their points needn't be gathered.
  const groups = new Map<number, Map<number, Point2>>();
  for (const [bin, mask] of sectors) if (bitCount(mask) >= SECTORS_NEEDED) groups.set(bin, new Map());
  if (groups.size === 0) return [];
  for (let i = 0; i < corners.length; i++) {
    for (const bin of binsOf(radii[i] ?? 0, width)) {
      const v = triangles[corners[i] ?? 0] ?? 0;
      groups.get(bin)?.set(v, [p[3 * v] ?? 0, p[3 * v + 1] ?? 0]);
    }
  }
  return [...groups.values()].map((points) => [...points.values()]);
}

/** Two rows of bins, half a width apart, so that no circle is cut in two by a bin's edge. */
const binsOf = (radius: number, width: number): [number, number] => [
  2 * Math.round(radius / width),
  2 * Math.floor(radius / width) + 1,
];

/** Places, among the triangles' corners, of those of upright faces whose normal runs about through the centre. */
function facingCorners(mesh: Mesh, faces: Faces, centre: Point2): Int32Array {
  const { normals, middlesMm } = faces;
  const [x, y] = centre;
  const out = new Int32Array(mesh.triangles.length);
  let count = 0;
  for (let t = 0; t < faces.areasMm2.length; t++) {
    if (Math.abs(normals[3 * t + 2] ?? 0) > WALL_SLOPE_MAX) continue;
    const nx = normals[3 * t] ?? 0;
    const ny = normals[3 * t + 1] ?? 0;
    if (nx * nx + ny * ny === 0) continue;
    const mx = (middlesMm[3 * t] ?? 0) - x;
    const my = (middlesMm[3 * t + 1] ?? 0) - y;
    if (Math.abs(mx * ny - my * nx) > 0.3 * Math.hypot(mx, my)) continue;
    for (let corner = 3 * t; corner < 3 * t + 3; corner++) out[count++] = corner;
  }
  return out.subarray(0, count);
}
