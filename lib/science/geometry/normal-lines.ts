import type { Faces } from "./faces";
import type { Mesh } from "./mesh";

/** A point of the plane across the axis, mm. */
export type Point2 = readonly [number, number];

/**
 * Straight lines of the plane across the axis that ought to pass through the centre, by the faces that they stand on:
 * a normal of length 1, the distance of the line from the origin along the wall, and the face's area as seen along the
 * wall's normal, mm². Flat arrays, as some ten thousand lines are gone through many times.
 */
export interface NormalLines {
  readonly nx: Float64Array;
  readonly ny: Float64Array;
  readonly alongMm: Float64Array;
  readonly weightMm2: Float64Array;
  /** Sum of the weights, and the middle of the faces by them. */
  readonly totalMm2: number;
  readonly middle: Point2;
}

/** Scales of the weights, as shares of the size, narrowed step by step. */
const SCALES = [0.2, 0.1, 0.05, 0.02, 0.02, 0.01, 0.01, 0.005, 0.005, 0.002, 0.002, 0.001, 0.001];

/**
 * The lines of all faces no steeper than `slopeMax`. Each goes through the middle of its face's extent along the wall,
 * not through its centroid: the perpendicular bisector of a chord passes through the circle's centre, however coarse the
 * facets are.
 */
export function normalLines(mesh: Mesh, faces: Faces, slopeMax: number): NormalLines {
  const { positions: p, triangles } = mesh;
  const { normals, areasMm2 } = faces;
  const out = Array.from({ length: 4 }, () => new Float64Array(areasMm2.length));
  const [nxs = new Float64Array(), nys = nxs, alongs = nxs, weights = nxs] = out;
  let count = 0;
  let [sum, sumX, sumY] = [0, 0, 0];
  for (let t = 0; t < areasMm2.length; t++) {
    const nx = normals[3 * t] ?? 0;
    const ny = normals[3 * t + 1] ?? 0;
    const flat = Math.sqrt(nx * nx + ny * ny);
    if (Math.abs(normals[3 * t + 2] ?? 0) > slopeMax || flat === 0) continue;
    const ux = nx / flat;
    const uy = ny / flat;
    const a = 3 * (triangles[3 * t] ?? 0);
    const b = 3 * (triangles[3 * t + 1] ?? 0);
    const c = 3 * (triangles[3 * t + 2] ?? 0);
    const sa = ux * (p[a + 1] ?? 0) - uy * (p[a] ?? 0);
    const sb = ux * (p[b + 1] ?? 0) - uy * (p[b] ?? 0);
    const sc = ux * (p[c + 1] ?? 0) - uy * (p[c] ?? 0);
    const weight = (areasMm2[t] ?? 0) * flat;
    nxs[count] = ux;
    nys[count] = uy;
    alongs[count] = (Math.min(sa, sb, sc) + Math.max(sa, sb, sc)) / 2;
    weights[count] = weight;
    sum += weight;
    sumX += weight * (faces.middlesMm[3 * t] ?? 0);
    sumY += weight * (faces.middlesMm[3 * t + 1] ?? 0);
    count++;
  }
  const cut = (values: Float64Array): Float64Array => values.subarray(0, count);
  const middle: Point2 = sum > 0 ? [sumX / sum, sumY / sum] : [0, 0];
  return { nx: cut(nxs), ny: cut(nys), alongMm: cut(alongs), weightMm2: cut(weights), totalMm2: sum, middle };
}

/** Area of the faces whose lines pass within a distance of a point, mm². */
export function inlierArea(lines: NormalLines, [x, y]: Point2, withinMm: number): number {
  const { nx, ny, alongMm, weightMm2 } = lines;
  let area = 0;
  for (let i = 0; i < nx.length; i++) {
    const miss = (alongMm[i] ?? 0) - (nx[i] ?? 0) * y + (ny[i] ?? 0) * x;
    if (miss <= withinMm && miss >= -withinMm) area += weightMm2[i] ?? 0;
  }
  return area;
}

/** The point that most lines near `start` pass through: least squares with Cauchy weights, narrowed step by step. */
export function converge(lines: NormalLines, start: Point2, sizeMm: number): Point2 {
  const { nx: nxs, ny: nys, alongMm, weightMm2 } = lines;
  let [x, y] = start;
  for (const scale of SCALES) {
    const narrow = 1 / (scale * sizeMm) ** 2;
    let [xx, xy, yy, bx, by] = [0, 0, 0, 0, 0];
    for (let i = 0; i < nxs.length; i++) {
      const nx = nxs[i] ?? 0;
      const ny = nys[i] ?? 0;
      const along = alongMm[i] ?? 0;
      const miss = along - nx * y + ny * x;
      const weight = (weightMm2[i] ?? 0) / (1 + miss * miss * narrow);
      xx += weight * ny * ny;
      xy -= weight * nx * ny;
      yy += weight * nx * nx;
      bx -= weight * ny * along;
      by += weight * nx * along;
    }
    const det = xx * yy - xy * xy;
    if (!(det > 1e-6 * (xx + yy) ** 2)) return [x, y];
    [x, y] = [(bx * yy - by * xy) / det, (by * xx - bx * xy) / det];
  }
  return [x, y];
}
