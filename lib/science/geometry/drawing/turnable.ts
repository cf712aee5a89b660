import type { Mesh } from "../mesh";
import { meshBounds, middleOf } from "../mesh";
import { drawableMesh } from "./sharp-edges";

/** A mesh as a graphics card takes it: single precision about its middle, with its sharp edges as pairs of points. */
export interface Turnable {
  readonly positions: Float32Array<ArrayBuffer>;
  readonly triangles: Uint32Array<ArrayBuffer>;
  /** x, y, z of both ends, edge by edge: sharp edges, and the seams where shells meet. */
  readonly edges: Float32Array<ArrayBuffer>;
  /** Radius of the sphere about the middle that holds it all, in the mesh's unit. */
  readonly radius: number;
}

/** Beyond this the edges take longer than they are worth; the surface alone is shown. */
const EDGES_MAX_TRIANGLES = 400_000;

/** Makes a mesh ready to be turned. */
export function turnable(mesh: Mesh): Turnable {
  const bounds = meshBounds(mesh);
  const [x, y, z] = bounds ? middleOf(bounds) : [0, 0, 0];
  const middle = [x, y, z];
  const positions = new Float32Array(mesh.positions.length);
  let most = 0;
  for (let i = 0; i < positions.length; i++) positions[i] = (mesh.positions[i] ?? 0) - (middle[i % 3] ?? 0);
  for (let i = 0; i < positions.length; i += 3) {
    most = Math.max(most, Math.hypot(positions[i] ?? 0, positions[i + 1] ?? 0, positions[i + 2] ?? 0));
  }
  return { positions, triangles: Uint32Array.from(mesh.triangles), edges: edgesOf(mesh, middle), radius: most };
}

function edgesOf(mesh: Mesh, middle: readonly number[]): Float32Array<ArrayBuffer> {
  if (mesh.triangles.length / 3 > EDGES_MAX_TRIANGLES) return new Float32Array(0);
  const { edges, sharp, seams } = drawableMesh(mesh);
  const points: number[] = [];
  const put = (value: number, axis: number): void => void points.push(value - (middle[axis] ?? 0));
  for (let e = 0; e < edges.count; e++) {
    if (sharp[e] !== 1) continue;
    for (const end of [edges.ends[2 * e] ?? 0, edges.ends[2 * e + 1] ?? 0]) {
      for (let axis = 0; axis < 3; axis++) put(mesh.positions[3 * end + axis] ?? 0, axis);
    }
  }
  for (const { from, to } of seams) [from, to].forEach((point) => point.forEach(put));
  return Float32Array.from(points);
}
