import type { Vec3 } from "../mesh";
import { cross, dot, minus, plus } from "../vectors";
import { cutSegment, edgesOf, type Corners } from "./triangle-meeting";

/** How close two things come, and where: a point on each. */
export interface Closeness {
  readonly distanceMm: number;
  readonly onFirst: Vec3;
  readonly onSecond: Vec3;
}

const apart = (onFirst: Vec3, onSecond: Vec3): Closeness => ({
  distanceMm: Math.hypot(...minus(onFirst, onSecond)),
  onFirst,
  onSecond,
});

const clamped = (value: number): number => (value < 0 ? 0 : value > 1 ? 1 : value);

/** The point of a triangle that is nearest to a point (Ericson, Real-Time Collision Detection, §5.1.5). */
export function nearestOnTriangle(p: Vec3, [a, b, c]: Corners): Vec3 {
  const [ab, ac] = [minus(b, a), minus(c, a)];
  const normal = cross(ab, ac);
  const area = dot(normal, normal);
  if (area > 0) {
    // Inside all three sides the foot of the perpendicular is nearest.
    const ap = minus(p, a);
    const v = dot(cross(ap, ac), normal) / area;
    const w = dot(cross(ab, ap), normal) / area;
    if (v >= 0 && w >= 0 && v + w <= 1) return plus(plus(a, ab, v), ac, w);
  }
  return edgesOf([a, b, c])
    .map(([from, to]) => nearestOnSegment(p, from, to))
    .reduce((best, q) => (Math.hypot(...minus(p, q)) < Math.hypot(...minus(p, best)) ? q : best));
}

/** The point of a segment that is nearest to a point. */
export function nearestOnSegment(p: Vec3, from: Vec3, to: Vec3): Vec3 {
  const along = minus(to, from);
  const length = dot(along, along);
  return length > 0 ? plus(from, along, clamped(dot(minus(p, from), along) / length)) : from;
}

/** How close two segments come (Ericson, §5.1.9). */
export function segmentCloseness(p: readonly [Vec3, Vec3], q: readonly [Vec3, Vec3]): Closeness {
  const [u, v, w] = [minus(p[1], p[0]), minus(q[1], q[0]), minus(p[0], q[0])];
  const [a, b, c, d, e] = [dot(u, u), dot(u, v), dot(v, v), dot(u, w), dot(v, w)];
  const determinant = a * c - b * b;
  const s = determinant > 1e-12 * a * c ? clamped((b * e - c * d) / determinant) : 0;
  const t = c > 0 ? (b * s + e) / c : 0;
  const onQ = plus(q[0], v, clamped(t));
  return apart(nearestOnSegment(onQ, p[0], p[1]), onQ);
}

/** How close two triangles come; 0 where they cut each other, at the middle of the cut. `mayCut` false: they don't. */
export function triangleCloseness(a: Corners, b: Corners, mayCut = true): Closeness {
  const cut = mayCut ? cutSegment(a, b) : undefined;
  if (cut) {
    const middle = plus(cut[0], minus(cut[1], cut[0]), 0.5);
    return { distanceMm: 0, onFirst: middle, onSecond: middle };
  }
  const candidates = [
    ...a.map((corner) => apart(corner, nearestOnTriangle(corner, b))),
    ...b.map((corner) => apart(nearestOnTriangle(corner, a), corner)),
    ...edgesOf(a).flatMap((p) => edgesOf(b).map((q) => segmentCloseness(p, q))),
  ];
  return candidates.reduce((best, next) => (next.distanceMm < best.distanceMm ? next : best));
}
