import { median } from "@/lib/science/statistics/descriptive";
import { facesOf, type Faces } from "./faces";
import type { Mesh } from "./mesh";

/** A point of the plane across the axis, mm. */
export type Point2 = readonly [number, number];

const WALL_SLOPE_MAX = 0.05;
const SURFACE_SLOPE_MAX = 0.9;
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

/** Straight lines that ought to pass through the centre, by the faces that they stand on. */
interface NormalLine {
  readonly x: number;
  readonly y: number;
  readonly nx: number;
  readonly ny: number;
  readonly weight: number;
}

/**
 * Where the rotation axis passes through x–y, for a mesh whose axis stands along z: the point that the normals of
 * walls pass through, found robustly (Cauchy weights, narrowed step by step, from several starts), then the common
 * centre of the circles on which their vertices lie, by least squares. So a heavy blade doesn't move it, as it would
 * the centroid. Without any round wall it is the middle of the surface.
 */
export function axisCentre(mesh: Mesh): Point2 {
  const faces = facesOf(mesh);
  const size = extent(mesh);
  const walls = normalLines(mesh, faces, WALL_SLOPE_MAX);
  const surfaces = normalLines(mesh, faces, SURFACE_SLOPE_MAX);
  const starts = [middle(surfaces), boxMiddle(mesh)];
  const best = (lines: NormalLine[]): { centre: Point2; score: number } =>
    starts
      .map((start) => converge(lines, start, size))
      .map((centre) => ({ centre, score: inlierArea(lines, centre, 0.004 * size) }))
      .reduce((a, b) => (b.score > a.score ? b : a));
  const byWalls = best(walls);
  const bySurfaces = best(surfaces);
  // Walls decide where they go around; otherwise every surface of revolution has a say.
  const centre = byWalls.score > 0.02 * total(surfaces) ? byWalls.centre : bySurfaces.centre;
  return commonCentre(mesh, faces, centre, size) ?? centre;
}

/**
 * The lines of all faces no steeper than `slopeMax`. Each goes through the middle of its face's extent along the wall,
 * not through its centroid: the perpendicular bisector of a chord passes through the circle's centre, however coarse the
 * facets are.
 */
function normalLines(mesh: Mesh, faces: Faces, slopeMax: number): NormalLine[] {
  const { positions: p, triangles } = mesh;
  const out: NormalLine[] = [];
  for (let t = 0; t < faces.areasMm2.length; t++) {
    const nx = faces.normals[3 * t] ?? 0;
    const ny = faces.normals[3 * t + 1] ?? 0;
    const flat = Math.sqrt(nx * nx + ny * ny);
    if (Math.abs(faces.normals[3 * t + 2] ?? 0) > slopeMax || flat === 0) continue;
    let [low, high, across] = [Infinity, -Infinity, 0];
    for (let i = 3 * t; i < 3 * t + 3; i++) {
      const v = 3 * (triangles[i] ?? 0);
      const [x, y] = [p[v] ?? 0, p[v + 1] ?? 0];
      const along = (nx * y - ny * x) / flat;
      if (along < low) low = along;
      if (along > high) high = along;
      across += (nx * x + ny * y) / flat / 3;
    }
    const middle = (low + high) / 2;
    const [ux, uy] = [nx / flat, ny / flat];
    const [x, y] = [across * ux - middle * uy, across * uy + middle * ux];
    out.push({ x, y, nx: ux, ny: uy, weight: (faces.areasMm2[t] ?? 0) * flat });
  }
  return out;
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

const total = (lines: NormalLine[]): number => lines.reduce((sum, line) => sum + line.weight, 0);

function middle(lines: NormalLine[]): Point2 {
  const sum = total(lines) || 1;
  return [lines.reduce((s, l) => s + l.weight * l.x, 0) / sum, lines.reduce((s, l) => s + l.weight * l.y, 0) / sum];
}

function boxMiddle(mesh: Mesh): Point2 {
  let [x0, x1, y0, y1] = [Infinity, -Infinity, Infinity, -Infinity];
  for (let i = 0; i < mesh.positions.length; i += 3) {
    const [x, y] = [mesh.positions[i] ?? 0, mesh.positions[i + 1] ?? 0];
    [x0, x1, y0, y1] = [Math.min(x0, x), Math.max(x1, x), Math.min(y0, y), Math.max(y1, y)];
  }
  return [(x0 + x1) / 2, (y0 + y1) / 2];
}

/** Distance by which a normal's line misses the centre. */
const miss = (line: NormalLine, c: Point2): number => (line.x - c[0]) * -line.ny + (line.y - c[1]) * line.nx;

function inlierArea(lines: NormalLine[], centre: Point2, within: number): number {
  return lines.reduce((sum, line) => (Math.abs(miss(line, centre)) <= within ? sum + line.weight : sum), 0);
}

function converge(lines: NormalLine[], start: Point2, size: number): Point2 {
  let centre = start;
  for (const scale of [0.2, 0.1, 0.05, 0.02, 0.02, 0.01, 0.01, 0.005, 0.005, 0.002, 0.002, 0.001, 0.001]) {
    let [xx, xy, yy, bx, by] = [0, 0, 0, 0, 0];
    for (const line of lines) {
      const weight = line.weight / (1 + (miss(line, centre) / (scale * size)) ** 2);
      const along = -line.ny * line.x + line.nx * line.y;
      xx += weight * line.ny * line.ny;
      xy -= weight * line.nx * line.ny;
      yy += weight * line.nx * line.nx;
      bx -= weight * line.ny * along;
      by += weight * line.nx * along;
    }
    const det = xx * yy - xy * xy;
    if (!(det > 1e-6 * (xx + yy) ** 2)) return centre;
    centre = [(bx * yy - by * xy) / det, (by * xx - bx * xy) / det];
  }
  return centre;
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
    const polar = points.map(([x, y]) => ({
      d: Math.hypot(x - centre[0], y - centre[1]),
      x: x - centre[0],
      y: y - centre[1],
    }));
    const typical = median(polar.map((p) => p.d)) ?? 0;
    let [sum, mx, my, md] = [0, 0, 0, 0];
    const weighted = polar.map((p) => {
      const weight = 1 / (1 + ((p.d - typical) / scale) ** 2);
      const [ux, uy] = p.d > 0 ? [p.x / p.d, p.y / p.d] : [0, 0];
      sum += weight;
      mx += weight * ux;
      my += weight * uy;
      md += weight * p.d;
      return { weight, ux, uy, d: p.d };
    });
    for (const { weight, ux, uy, d } of weighted) {
      const [cx, cy, cd] = [ux - mx / sum, uy - my / sum, d - md / sum];
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
  const groups = new Map<number, { points: Map<number, Point2>; sectors: Set<number> }>();
  for (let t = 0; t < faces.areasMm2.length; t++) {
    const [nx, ny, nz] = [faces.normals[3 * t] ?? 0, faces.normals[3 * t + 1] ?? 0, faces.normals[3 * t + 2] ?? 0];
    if (Math.abs(nz) > WALL_SLOPE_MAX || nx * nx + ny * ny === 0) continue;
    const [mx, my] = [(faces.middlesMm[3 * t] ?? 0) - centre[0], (faces.middlesMm[3 * t + 1] ?? 0) - centre[1]];
    if (Math.abs(mx * ny - my * nx) > 0.3 * Math.hypot(mx, my)) continue;
    for (let corner = 0; corner < 3; corner++) {
      const v = mesh.triangles[3 * t + corner] ?? 0;
      const [x, y] = [mesh.positions[3 * v] ?? 0, mesh.positions[3 * v + 1] ?? 0];
      const radius = Math.hypot(x - centre[0], y - centre[1]);
      const turn = Math.atan2(y - centre[1], x - centre[0]) / (2 * Math.PI) + 1;
      // Two rows of bins, half a width apart, so that no circle is cut in two by a bin's edge.
      for (const key of [2 * Math.round(radius / width), 2 * Math.floor(radius / width) + 1]) {
        const group = groups.get(key) ?? { points: new Map<number, Point2>(), sectors: new Set<number>() };
        groups.set(key, group);
        group.points.set(v, [x, y]);
        group.sectors.add(Math.floor(turn * SECTORS) % SECTORS);
      }
    }
  }
  return [...groups.values()].filter((g) => g.sectors.size >= SECTORS_NEEDED).map((g) => [...g.points.values()]);
}
