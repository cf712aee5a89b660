import type { Mesh } from "../mesh";

/** Boxes around triangles, in a tree: node 0 is the root, leaves hold runs of `order`. */
export interface TriangleTree {
  readonly mesh: Mesh;
  /** Boxes of single triangles, by their numbers in the mesh. */
  readonly own: Float64Array;
  /** Triangle numbers in the order of the leaves. */
  readonly order: Uint32Array;
  /** Six numbers a node: the lowest and the highest x, y, z. */
  readonly boxes: Float64Array;
  /** Two numbers a node: the first of two child nodes (they follow each other) and 0, or the start of a run and its length. */
  readonly nodes: Uint32Array;
}

const LEAF = 6;

/** Boxes around every triangle of a mesh: the lowest and the highest x, y, z. Trees over parts of one mesh share them. */
export function triangleBoxes({ positions: p, triangles }: Mesh): Float64Array {
  const out = new Float64Array(2 * triangles.length);
  for (let t = 0; t < triangles.length; t += 3) {
    for (let axis = 0; axis < 3; axis++) {
      const a = p[3 * (triangles[t] ?? 0) + axis] ?? 0;
      const b = p[3 * (triangles[t + 1] ?? 0) + axis] ?? 0;
      const c = p[3 * (triangles[t + 2] ?? 0) + axis] ?? 0;
      out[2 * t + axis] = a < b ? (a < c ? a : c) : b < c ? b : c;
      out[2 * t + 3 + axis] = a > b ? (a > c ? a : c) : b > c ? b : c;
    }
  }
  return out;
}

/** Builds a tree over some triangles of a mesh (all where left out), split at the middle of the longest side. */
export function triangleTree(mesh: Mesh, chosen?: readonly number[], own = triangleBoxes(mesh)): TriangleTree {
  const count = chosen?.length ?? mesh.triangles.length / 3;
  const order = chosen ? Uint32Array.from(chosen) : Uint32Array.from({ length: count }, (_, t) => t);
  const nodesMax = Math.max(1, 2 * count);
  const tree = { mesh, own, order, boxes: new Float64Array(6 * nodesMax), nodes: new Uint32Array(2 * nodesMax) };
  let made = 1;
  const open: [number, number, number][] = [[0, 0, count]];
  for (let job = open.pop(); job; job = open.pop()) {
    const [node, from, to] = job;
    boxAround(tree, node, from, to);
    const middle = to - from > LEAF ? split(tree, node, from, to) : from;
    if (middle <= from || middle >= to) {
      tree.nodes[2 * node] = from;
      tree.nodes[2 * node + 1] = to - from;
      continue;
    }
    tree.nodes[2 * node] = made;
    tree.nodes[2 * node + 1] = 0;
    open.push([made, from, middle], [made + 1, middle, to]);
    made += 2;
  }
  return tree;
}

/** Whether a node is a leaf; its run of `order` starts at `nodes[2 n]` and is `nodes[2 n + 1]` long. */
export const isLeaf = (tree: TriangleTree, node: number): boolean =>
  (tree.nodes[2 * node + 1] ?? 0) > 0 || tree.order.length === 0;

function boxAround({ own, order, boxes }: TriangleTree, node: number, from: number, to: number): void {
  for (let axis = 0; axis < 3; axis++) {
    let [low, high] = [Infinity, -Infinity];
    for (let i = from; i < to; i++) {
      const at = 6 * (order[i] ?? 0) + axis;
      const [least = 0, most = 0] = [own[at], own[at + 3]];
      if (least < low) low = least;
      if (most > high) high = most;
    }
    boxes[6 * node + axis] = low;
    boxes[6 * node + 3 + axis] = high;
  }
}

/** Parts a run at the middle of its box's longest side; in halves where that leaves one side empty. */
function split({ order, own, boxes }: TriangleTree, node: number, from: number, to: number): number {
  const side = (axis: number): number => (boxes[6 * node + 3 + axis] ?? 0) - (boxes[6 * node + axis] ?? 0);
  const axis = side(0) >= side(1) && side(0) >= side(2) ? 0 : side(1) >= side(2) ? 1 : 2;
  const twice = 2 * (boxes[6 * node + axis] ?? 0) + side(axis);
  let [low, high] = [from, to - 1];
  while (low <= high) {
    const triangle = order[low] ?? 0;
    if ((own[6 * triangle + axis] ?? 0) + (own[6 * triangle + 3 + axis] ?? 0) < twice) low++;
    else {
      order[low] = order[high] ?? 0;
      order[high--] = triangle;
    }
  }
  return low === from || low === to ? (from + to) >> 1 : low;
}

/** Calls `visit` with every two triangles of two trees whose boxes come within `withinMm` of each other. */
export function eachClosePair(
  a: TriangleTree,
  b: TriangleTree,
  withinMm: number,
  visit: (inA: number, inB: number) => void,
): void {
  if (a.order.length === 0 || b.order.length === 0) return;
  const open: number[] = [0, 0];
  const limit = withinMm * withinMm;
  while (open.length > 0) {
    const nb = open.pop() ?? 0;
    const na = open.pop() ?? 0;
    if (boxGapSquared(a.boxes, na, b.boxes, nb) > limit) continue;
    const leafA = isLeaf(a, na);
    const leafB = isLeaf(b, nb);
    if (leafA && leafB) {
      const [fromA = 0, fromB = 0] = [a.nodes[2 * na], b.nodes[2 * nb]];
      const [toA, toB] = [fromA + (a.nodes[2 * na + 1] ?? 0), fromB + (b.nodes[2 * nb + 1] ?? 0)];
      for (let i = fromA; i < toA; i++) {
        const inA = a.order[i] ?? 0;
        for (let j = fromB; j < toB; j++) {
          const inB = b.order[j] ?? 0;
          if (boxGapSquared(a.own, inA, b.own, inB) <= limit) visit(inA, inB);
        }
      }
    } else if (leafB || (!leafA && boxSize(a, na) >= boxSize(b, nb))) {
      const child = a.nodes[2 * na] ?? 0;
      open.push(child, nb, child + 1, nb);
    } else {
      const child = b.nodes[2 * nb] ?? 0;
      open.push(na, child, na, child + 1);
    }
  }
}

/** Square of the gap between two boxes, by their places in two lists of boxes, mm²; 0 where they meet. */
export function boxGapSquared(a: Float64Array, na: number, b: Float64Array, nb: number): number {
  let sum = 0;
  for (let axis = 0; axis < 3; axis++) {
    const below = (b[6 * nb + axis] ?? 0) - (a[6 * na + 3 + axis] ?? 0);
    const above = (a[6 * na + axis] ?? 0) - (b[6 * nb + 3 + axis] ?? 0);
    const gap = below > above ? below : above;
    if (gap > 0) sum += gap * gap;
  }
  return sum;
}

/** Longest side of a node's box, mm. */
export function boxSize({ boxes }: TriangleTree, node: number): number {
  const at = 6 * node;
  const x = (boxes[at + 3] ?? 0) - (boxes[at] ?? 0);
  const y = (boxes[at + 4] ?? 0) - (boxes[at + 1] ?? 0);
  const z = (boxes[at + 5] ?? 0) - (boxes[at + 2] ?? 0);
  return Math.max(x, y, z);
}
