import type { Bounds, Mesh } from "./mesh";

/** A mesh of fewer triangles with the shell of each. */
export interface CoarseMesh {
  readonly mesh: Mesh;
  readonly shellOf: Int32Array;
}

/** Edge of a cell as a share of the box's longest side: 0.7 mm on a fan of 140 mm. */
const CELLS = 192;

/**
 * The same body with far fewer triangles: all vertices of one cubic cell become the first of them, and triangles that
 * thereby lose a corner vanish (vertex clustering, Rossignac & Borrel 1993). Every closed shell stays closed, as its
 * triangles still cancel along each edge, so lines through it still enter as often as they leave. For finding out what
 * is there, not for measuring: walls thinner than a cell may vanish.
 */
export function coarsened(mesh: Mesh, shellOf: Int32Array, bounds: Bounds): CoarseMesh {
  const { positions: p, triangles } = mesh;
  const longest = Math.max(...bounds.max.map((value, axis) => value - (bounds.min[axis] ?? 0)));
  const scale = CELLS / longest;
  const vertices = p.length / 3;
  const stand = new Int32Array(vertices);
  let slots = 1 << 16;
  while (slots < 2 * vertices) slots *= 2;
  const [keys, firsts] = [new Int32Array(slots), new Int32Array(slots)];
  const [x0, y0, z0] = bounds.min;
  const kept = new Uint32Array(vertices);
  let count = 0;
  for (let v = 0; v < vertices; v++) {
    const i = ((p[3 * v] ?? 0) - x0) * scale;
    const j = ((p[3 * v + 1] ?? 0) - y0) * scale;
    const k = ((p[3 * v + 2] ?? 0) - z0) * scale;
    const key = 1 + (i | 0) + (CELLS + 1) * ((j | 0) + (CELLS + 1) * (k | 0));
    let slot = (Math.imul(key, 0x9e3779b1) >>> 8) & (slots - 1);
    while (keys[slot] !== 0 && keys[slot] !== key) slot = (slot + 1) & (slots - 1);
    if (keys[slot] === 0) {
      keys[slot] = key;
      firsts[slot] = count;
      kept[count++] = v;
    }
    stand[v] = firsts[slot] ?? 0;
  }
  const positions = new Float64Array(3 * count);
  for (let i = 0; i < positions.length; i++) positions[i] = p[3 * (kept[(i / 3) | 0] ?? 0) + (i % 3)] ?? 0;
  const { corners, shells } = collapsed(triangles, stand, shellOf);
  return { mesh: { positions, triangles: corners }, shellOf: shells };
}

function collapsed(triangles: Uint32Array, stand: Int32Array, shellOf: Int32Array) {
  let count = 0;
  const each = (visit: (a: number, b: number, c: number, shell: number) => void): void => {
    for (let t = 0; t < shellOf.length; t++) {
      const shell = shellOf[t] ?? -1;
      if (shell < 0) continue;
      const a = stand[triangles[3 * t] ?? 0] ?? 0;
      const b = stand[triangles[3 * t + 1] ?? 0] ?? 0;
      const c = stand[triangles[3 * t + 2] ?? 0] ?? 0;
      if (a !== b && b !== c && c !== a) visit(a, b, c, shell);
    }
  };
  each(() => count++);
  const corners = new Uint32Array(3 * count);
  const shells = new Int32Array(count);
  let to = 0;
  each((a, b, c, shell) => {
    corners[3 * to] = a;
    corners[3 * to + 1] = b;
    corners[3 * to + 2] = c;
    shells[to++] = shell;
  });
  return { corners, shells };
}
