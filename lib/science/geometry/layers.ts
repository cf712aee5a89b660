import type { Mesh } from "./mesh";

/** A mesh whose exactly repeated triangles stand on vertices of their own. */
export interface LayeredMesh {
  readonly mesh: Mesh;
  /** Triangles that repeat an earlier one with the same corners and orientation. */
  readonly duplicateTriangles: number;
}

/**
 * Takes copies of shells apart: the n-th occurrence of a triangle goes to a layer of its own vertices, so that a shell
 * saved twice is two closed shells instead of one with every edge used four times. A mesh without repeated triangles
 * is handed back as it is.
 */
export function separateDuplicates(mesh: Mesh): LayeredMesh {
  const { triangles } = mesh;
  const vertices = mesh.positions.length / 3;
  const count = triangles.length / 3;
  const layers = new Uint16Array(count);
  const table = new Int32Array(tableSize(count)).fill(-1);
  const mask = table.length - 1;
  const corners = new Uint32Array(3);
  let duplicateTriangles = 0;
  for (let t = 0; t < count; t++) {
    rotated(triangles, t, corners);
    const [a = 0, b = 0, c = 0] = corners;
    let slot = (Math.imul(a, 0x9e3779b1) ^ Math.imul(b, 0x85ebca77) ^ Math.imul(c, 0xc2b2ae3d)) & mask;
    for (; table[slot] !== -1; slot = (slot + 1) & mask) {
      const earlier = table[slot] ?? 0;
      rotated(triangles, earlier, corners);
      if (corners[0] !== a || corners[1] !== b || corners[2] !== c) continue;
      // The slot remembers the latest copy, so that the layers count up.
      layers[t] = (layers[earlier] ?? 0) + 1;
      duplicateTriangles++;
      break;
    }
    table[slot] = t;
  }
  if (duplicateTriangles === 0) return { mesh, duplicateTriangles };
  return { mesh: onOwnVertices(mesh, layers, vertices), duplicateTriangles };
}

function tableSize(count: number): number {
  let size = 16;
  while (size < 2 * count) size *= 2;
  return size;
}

/** Corners of a triangle from its lowest one on: equal for equal triangles of equal orientation. */
function rotated(triangles: Uint32Array, t: number, out: Uint32Array): void {
  const a = triangles[3 * t] ?? 0;
  const b = triangles[3 * t + 1] ?? 0;
  const c = triangles[3 * t + 2] ?? 0;
  const first = a <= b && a <= c ? 0 : b <= c ? 1 : 2;
  out[0] = first === 0 ? a : first === 1 ? b : c;
  out[1] = first === 0 ? b : first === 1 ? c : a;
  out[2] = first === 0 ? c : first === 1 ? a : b;
}

function onOwnVertices(mesh: Mesh, layers: Uint16Array, vertices: number): Mesh {
  const triangles = mesh.triangles.slice();
  const copies = new Map<number, number>();
  const added: number[] = [];
  for (let i = 0; i < triangles.length; i++) {
    const layer = layers[(i / 3) | 0] ?? 0;
    if (layer === 0) continue;
    const vertex = triangles[i] ?? 0;
    const key = layer * vertices + vertex;
    let copy = copies.get(key);
    if (copy === undefined) {
      copy = vertices + added.length / 3;
      copies.set(key, copy);
      for (let axis = 0; axis < 3; axis++) added.push(mesh.positions[3 * vertex + axis] ?? 0);
    }
    triangles[i] = copy;
  }
  const positions = new Float64Array(mesh.positions.length + added.length);
  positions.set(mesh.positions);
  positions.set(added, mesh.positions.length);
  return { positions, triangles };
}
