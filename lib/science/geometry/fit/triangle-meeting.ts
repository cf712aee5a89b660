import type { Mesh, Vec3 } from "../mesh";
import { cross, dot, minus, plus } from "../vectors";

/** The three corners of a triangle, mm. */
export type Corners = readonly [Vec3, Vec3, Vec3];

/** Corners of one triangle of a mesh. */
export function cornersOf({ positions: p, triangles }: Mesh, triangle: number): Corners {
  const corner = (c: number): Vec3 => {
    const at = 3 * (triangles[3 * triangle + c] ?? 0);
    return [p[at] ?? 0, p[at + 1] ?? 0, p[at + 2] ?? 0];
  };
  return [corner(0), corner(1), corner(2)];
}

/**
 * The segment in which two triangles cut each other, or undefined where they don't, or lie in one plane. A triangle can
 * be cut with none of its corners inside the other body, so edges are tried both ways: where an edge of one passes
 * through the other is an end of the segment.
 */
export function cutSegment(a: Corners, b: Corners): readonly [Vec3, Vec3] | undefined {
  const points: Vec3[] = [];
  for (const [from, to] of edgesOf(a)) collect(points, throughTriangle(from, to, b));
  for (const [from, to] of edgesOf(b)) collect(points, throughTriangle(from, to, a));
  let best: readonly [Vec3, Vec3] | undefined;
  let length = 0;
  points.forEach((p, i) =>
    points.slice(i + 1).forEach((q) => {
      const apart = Math.hypot(...minus(p, q));
      if (apart > length) [best, length] = [[p, q], apart];
    }),
  );
  return best;
}

/** The edges of a triangle. */
export const edgesOf = ([a, b, c]: Corners): readonly (readonly [Vec3, Vec3])[] => [
  [a, b],
  [b, c],
  [c, a],
];

function collect(points: Vec3[], point: Vec3 | undefined): void {
  if (point) points.push(point);
}

/** Where a segment passes through a triangle; undefined where it doesn't or runs along its plane (Möller & Trumbore 1997). */
export function throughTriangle(from: Vec3, to: Vec3, [a, b, c]: Corners): Vec3 | undefined {
  const along = minus(to, from);
  const [u, v] = [minus(b, a), minus(c, a)];
  const across = cross(along, v);
  const determinant = dot(u, across);
  if (determinant === 0) return undefined;
  const back = minus(from, a);
  const s = dot(back, across) / determinant;
  if (s < 0 || s > 1) return undefined;
  const other = cross(back, u);
  const t = dot(along, other) / determinant;
  if (t < 0 || s + t > 1) return undefined;
  const at = dot(v, other) / determinant;
  return at < 0 || at > 1 ? undefined : plus(from, along, at);
}

/** Whether all corners of triangle `t` lie strictly on one side of the plane of triangle `s`, both of one mesh. */
export function apartByPlane({ positions: p, triangles }: Mesh, s: number, t: number): boolean {
  const a = 3 * (triangles[3 * s] ?? 0);
  const b = 3 * (triangles[3 * s + 1] ?? 0);
  const c = 3 * (triangles[3 * s + 2] ?? 0);
  const ax = p[a] ?? 0;
  const ay = p[a + 1] ?? 0;
  const az = p[a + 2] ?? 0;
  const ux = (p[b] ?? 0) - ax;
  const uy = (p[b + 1] ?? 0) - ay;
  const uz = (p[b + 2] ?? 0) - az;
  const vx = (p[c] ?? 0) - ax;
  const vy = (p[c + 1] ?? 0) - ay;
  const vz = (p[c + 2] ?? 0) - az;
  const nx = uy * vz - uz * vy;
  const ny = uz * vx - ux * vz;
  const nz = ux * vy - uy * vx;
  let above = 0;
  let below = 0;
  for (let corner = 0; corner < 3; corner++) {
    const q = 3 * (triangles[3 * t + corner] ?? 0);
    const side = nx * ((p[q] ?? 0) - ax) + ny * ((p[q + 1] ?? 0) - ay) + nz * ((p[q + 2] ?? 0) - az);
    if (side > 0) above++;
    if (side < 0) below++;
  }
  return above === 3 || below === 3;
}
