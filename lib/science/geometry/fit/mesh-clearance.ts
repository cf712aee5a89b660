import type { Vec3 } from "../mesh";
import { triangleCloseness, type Closeness } from "./triangle-distance";
import { cornersOf } from "./triangle-meeting";
import { boxGapSquared, boxSize, isLeaf, type TriangleTree } from "./triangle-tree";

/** Pairs that could be closer by less than this aren't looked at: flat faces have thousands that are as close. */
const CLOSE_ENOUGH_MM = 0.001;

/**
 * How close two closed surfaces come, to a thousandth of a millimetre, and where; 0 where one reaches into the other or
 * lies within it. Undefined when one has no triangles. Corners, edges and faces are tried, not samples.
 */
export function meshCloseness(a: TriangleTree, b: TriangleTree): Closeness | undefined {
  const surfaces = surfaceCloseness(a, b);
  if (!surfaces || surfaces.distanceMm === 0) return surfaces;
  // No surface cuts the other, so one corner tells whether one body is inside the other.
  const [inA, inB] = [cornersOf(a.mesh, a.order[0] ?? 0)[0], cornersOf(b.mesh, b.order[0] ?? 0)[0]];
  const within = isInside(b, inA) ? inA : isInside(a, inB) ? inB : undefined;
  return within ? { distanceMm: 0, onFirst: within, onSecond: within } : surfaces;
}

function surfaceCloseness(a: TriangleTree, b: TriangleTree): Closeness | undefined {
  if (a.order.length === 0 || b.order.length === 0) return undefined;
  let best: Closeness | undefined;
  const limit = (): number => (best ? Math.max(0, best.distanceMm - CLOSE_ENOUGH_MM) ** 2 : Infinity);
  const open: [number, number][] = [[0, 0]];
  for (let pair = open.pop(); pair; pair = open.pop()) {
    const [na, nb] = pair;
    if (best && boxGapSquared(a.boxes, na, b.boxes, nb) >= limit()) continue;
    const [leafA, leafB] = [isLeaf(a, na), isLeaf(b, nb)];
    if (leafA && leafB) {
      eachPairOfLeaves(a, na, b, nb, (s, t) => {
        const gap = boxGapSquared(a.own, s, b.own, t);
        if (best && gap >= limit()) return;
        const found = triangleCloseness(cornersOf(a.mesh, s), cornersOf(b.mesh, t), gap === 0);
        if (!best || found.distanceMm < best.distanceMm) best = found;
      });
      if (best?.distanceMm === 0) return best;
      continue;
    }
    const splitA = leafB || (!leafA && boxSize(a, na) >= boxSize(b, nb));
    const child = (splitA ? a.nodes[2 * na] : b.nodes[2 * nb]) ?? 0;
    const next: [number, number][] = splitA
      ? [
          [child, nb],
          [child + 1, nb],
        ]
      : [
          [na, child],
          [na, child + 1],
        ];
    // The closer half is looked at first, so that the other is soon out of the question.
    next.sort((p, q) => boxGapSquared(a.boxes, q[0], b.boxes, q[1]) - boxGapSquared(a.boxes, p[0], b.boxes, p[1]));
    open.push(...next);
  }
  return best;
}

function eachPairOfLeaves(
  a: TriangleTree,
  na: number,
  b: TriangleTree,
  nb: number,
  visit: (s: number, t: number) => void,
): void {
  const [fromA = 0, countA = 0] = [a.nodes[2 * na], a.nodes[2 * na + 1]];
  const [fromB = 0, countB = 0] = [b.nodes[2 * nb], b.nodes[2 * nb + 1]];
  for (let i = fromA; i < fromA + countA; i++) {
    for (let j = fromB; j < fromB + countB; j++) visit(a.order[i] ?? 0, b.order[j] ?? 0);
  }
}

/**
 * Whether a point lies inside a closed surface, by its winding number: the solid angles of all triangles over 4π (Van
 * Oosterom & Strackee, IEEE Trans. Biomed. Eng. 30(2), 1983). Overlapping shells count as one body.
 */
export function isInside({ mesh, order }: TriangleTree, [x, y, z]: Vec3): boolean {
  let sum = 0;
  for (const triangle of order) {
    const [a, b, c] = cornersOf(mesh, triangle).map(([u, v, w]): Vec3 => [u - x, v - y, w - z]) as [Vec3, Vec3, Vec3];
    const [la, lb, lc] = [Math.hypot(...a), Math.hypot(...b), Math.hypot(...c)];
    const volume =
      a[0] * (b[1] * c[2] - b[2] * c[1]) + a[1] * (b[2] * c[0] - b[0] * c[2]) + a[2] * (b[0] * c[1] - b[1] * c[0]);
    const ab = a[0] * b[0] + a[1] * b[1] + a[2] * b[2];
    const bc = b[0] * c[0] + b[1] * c[1] + b[2] * c[2];
    const ca = c[0] * a[0] + c[1] * a[1] + c[2] * a[2];
    sum += 2 * Math.atan2(volume, la * lb * lc + ab * lc + bc * la + ca * lb);
  }
  return Math.abs(sum) > 2 * Math.PI;
}
