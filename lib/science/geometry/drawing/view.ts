import type { Mesh, Vec3 } from "../mesh";
import { cross, dot, unit } from "../vectors";

/** Directions of a parallel view: right-handed, of length 1. */
export interface View {
  readonly right: Vec3;
  readonly up: Vec3;
  /** From the model towards the eye. */
  readonly towards: Vec3;
}

/** A mesh as seen in a view: per vertex x to the right, y up and depth towards the eye, mm. */
export interface SeenMesh {
  readonly x: Float64Array;
  readonly y: Float64Array;
  readonly depth: Float64Array;
  readonly triangles: Uint32Array;
}

/** The view from `towards`, with `up` (any length, not along it) upwards. Throws a RangeError for bad directions. */
export function viewFrom(towards: Vec3, up: Vec3): View {
  const to = unit(towards);
  const right = to && unit(cross(up, to));
  if (!to || !right) throw new RangeError("a view needs two directions that differ");
  return { right, up: cross(to, right), towards: to };
}

/** Seen along an axis from its far end, the most upright of the other file axes up. */
export function frontView(axis: Vec3): View {
  return viewFrom(axis, sideways(axis));
}

/** Seen across an axis, which runs to the right. */
export function sideView(axis: Vec3): View {
  const front = frontView(axis);
  return { right: front.towards, up: front.up, towards: cross(front.towards, front.up) };
}

/** The file axis that stands most across a direction; z before y before x where they tie. */
function sideways(axis: Vec3): Vec3 {
  const candidates: readonly Vec3[] = [
    [0, 0, 1],
    [0, 1, 0],
    [1, 0, 0],
  ];
  const best = candidates.reduce((a, b) => (Math.abs(dot(b, axis)) < Math.abs(dot(a, axis)) - 1e-6 ? b : a));
  return best;
}

/** Projects every vertex, about a point that comes to lie at 0, 0, 0. */
export function seeMesh(mesh: Mesh, view: View, about: Vec3): SeenMesh {
  const { positions: p, triangles } = mesh;
  const count = p.length / 3;
  const [x, y, depth] = [new Float64Array(count), new Float64Array(count), new Float64Array(count)];
  const { right, up, towards } = view;
  for (let v = 0; v < count; v++) {
    const a = (p[3 * v] ?? 0) - about[0];
    const b = (p[3 * v + 1] ?? 0) - about[1];
    const c = (p[3 * v + 2] ?? 0) - about[2];
    x[v] = a * right[0] + b * right[1] + c * right[2];
    y[v] = a * up[0] + b * up[1] + c * up[2];
    depth[v] = a * towards[0] + b * towards[1] + c * towards[2];
  }
  return { x, y, depth, triangles };
}

/** One point as seen: x to the right, y up, depth towards the eye, mm. */
export function seePoint(point: Vec3, { right, up, towards }: View, about: Vec3): Vec3 {
  const from: Vec3 = [point[0] - about[0], point[1] - about[1], point[2] - about[2]];
  return [dot(from, right), dot(from, up), dot(from, towards)];
}
