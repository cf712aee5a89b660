import { vertexAt, type Mesh } from "./mesh";
import { cross, dot, minus, unit } from "./vectors";

/** A triangle at an edge that more than two use: which one, and whether it runs from the edge's lower vertex. */
export interface EdgeUse {
  readonly triangle: number;
  readonly forward: boolean;
  /** The vertex that isn't on the edge. */
  readonly opposite: number;
}

const SAME_ANGLE = 1e-6;

/**
 * Pairs the triangles of a crowded edge so that each pair has solid between its two: solids that touch along an edge or
 * face come apart that way. Returns pairs of triangles; what is left over has no partner.
 */
export function pairAroundEdge(mesh: Mesh, v: number, w: number, uses: readonly EdgeUse[]): [number, number][] {
  const start = vertexAt(mesh, v);
  const along = unit(minus(vertexAt(mesh, w), start));
  if (!along) return [];
  const x = unit(cross(along, Math.abs(along[0]) < 0.9 ? [1, 0, 0] : [0, 1, 0])) ?? [0, 0, 0];
  const y = cross(along, x);
  const angled = uses.map((use) => {
    const out = minus(vertexAt(mesh, use.opposite), start);
    return { ...use, angle: Math.atan2(dot(out, y), dot(out, x)) };
  });
  const backward = angled.filter((use) => !use.forward);
  const pairs: [number, number][] = [];
  for (const one of angled.filter((use) => use.forward)) {
    // Solid lies clockwise of a forward triangle, up to the nearest backward one; two faces back to back hold none.
    const wedge = (angle: number): number => {
      const turn = (((one.angle - angle) % (2 * Math.PI)) + 2 * Math.PI) % (2 * Math.PI);
      return turn < SAME_ANGLE ? turn + 2 * Math.PI : turn;
    };
    const nearest = backward.reduce<(typeof backward)[number] | undefined>(
      (best, use) => (best && wedge(best.angle) <= wedge(use.angle) ? best : use),
      undefined,
    );
    if (!nearest) break;
    backward.splice(backward.indexOf(nearest), 1);
    pairs.push([one.triangle, nearest.triangle]);
  }
  return pairs;
}
