import type { Mesh } from "../mesh";

/** Undirected edges of a mesh with the triangles on both sides. */
export interface MeshEdges {
  readonly count: number;
  /** Two vertices an edge, the lower first. */
  readonly ends: Uint32Array;
  /** Two triangles an edge; −1 for none. Edges of three triangles or more come once for each two of them. */
  readonly sides: Int32Array;
}

/** Collects the edges in linear time: half-edges are sorted by their lower vertex, then matched inside its run. */
export function meshEdges({ positions, triangles }: Mesh): MeshEdges {
  const vertices = positions.length / 3;
  const starts = new Uint32Array(vertices + 2);
  const halves = triangles.length;
  for (let h = 0; h < halves; h++) {
    const low = lowEnd(triangles, h) + 2;
    starts[low] = (starts[low] ?? 0) + 1;
  }
  for (let v = 2; v < starts.length; v++) starts[v] = (starts[v] ?? 0) + (starts[v - 1] ?? 0);
  const sorted = new Uint32Array(halves);
  for (let h = 0; h < halves; h++) {
    const slot = lowEnd(triangles, h) + 1;
    const at = starts[slot] ?? 0;
    sorted[at] = h;
    starts[slot] = at + 1;
  }
  const ends = new Uint32Array(2 * halves);
  const sides = new Int32Array(2 * halves);
  // For each higher vertex of a run: the edge that waits for its second triangle.
  const waiting = new Int32Array(vertices).fill(-1);
  let count = 0;
  for (let v = 0; v < vertices; v++) {
    const [from, to] = [starts[v] ?? 0, starts[v + 1] ?? 0];
    for (let i = from; i < to; i++) {
      const h = sorted[i] ?? 0;
      const high = highEnd(triangles, h);
      if (high === v) continue;
      const edge = waiting[high] ?? -1;
      if (edge >= 0) {
        sides[2 * edge + 1] = (h / 3) | 0;
        waiting[high] = -1;
        continue;
      }
      ends[2 * count] = v;
      ends[2 * count + 1] = high;
      sides[2 * count] = (h / 3) | 0;
      sides[2 * count + 1] = -1;
      waiting[high] = count++;
    }
    for (let i = from; i < to; i++) waiting[highEnd(triangles, sorted[i] ?? 0)] = -1;
  }
  return { count, ends: ends.subarray(0, 2 * count), sides: sides.subarray(0, 2 * count) };
}

const nextHalf = (h: number): number => (h % 3 === 2 ? h - 2 : h + 1);
const lowEnd = (t: Uint32Array, h: number): number => Math.min(t[h] ?? 0, t[nextHalf(h)] ?? 0);
const highEnd = (t: Uint32Array, h: number): number => Math.max(t[h] ?? 0, t[nextHalf(h)] ?? 0);
