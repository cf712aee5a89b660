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
  const cells = new CellNumbers();
  const [x0, y0, z0] = bounds.min;
  const kept = new Uint32Array(vertices);
  let [count, lastKey, last] = [0, 0, 0];
  for (let v = 0; v < vertices; v++) {
    const i = ((p[3 * v] ?? 0) - x0) * scale;
    const j = ((p[3 * v + 1] ?? 0) - y0) * scale;
    const k = ((p[3 * v + 2] ?? 0) - z0) * scale;
    const key = 1 + (i | 0) + (CELLS + 1) * ((j | 0) + (CELLS + 1) * (k | 0));
    // Below 1 is a vertex outside the box, which no triangle uses.
    if (key < 1) continue;
    // Neighbours in the file mostly lie in one cell.
    if (key !== lastKey) {
      lastKey = key;
      last = cells.numberOf(key);
      if (last === count) kept[count++] = v;
    }
    stand[v] = last;
  }
  const positions = new Float64Array(3 * count);
  for (let i = 0; i < positions.length; i++) positions[i] = p[3 * (kept[(i / 3) | 0] ?? 0) + (i % 3)] ?? 0;
  const { corners, shells } = collapsed(triangles, stand, shellOf);
  return { mesh: { positions, triangles: corners }, shellOf: shells };
}

/** Numbers cells in the order in which they are met. A table no larger than they need stays in the processor's cache. */
class CellNumbers {
  private keys = new Int32Array(1 << 16);
  private numbers = new Int32Array(1 << 16);
  private count = 0;

  /** Number of a cell by its key (above 0); a new cell gets the next number. */
  numberOf(key: number): number {
    let slot = this.slotOf(key);
    if (this.keys[slot] === key) return this.numbers[slot] ?? 0;
    if (2 * this.count >= this.keys.length) {
      this.grow();
      slot = this.slotOf(key);
    }
    this.keys[slot] = key;
    this.numbers[slot] = this.count;
    return this.count++;
  }

  private slotOf(key: number): number {
    const { keys } = this;
    const mask = keys.length - 1;
    let slot = (Math.imul(key, 0x9e3779b1) >>> 8) & mask;
    while (keys[slot] !== 0 && keys[slot] !== key) slot = (slot + 1) & mask;
    return slot;
  }

  private grow(): void {
    const { keys, numbers } = this;
    this.keys = new Int32Array(2 * keys.length);
    this.numbers = new Int32Array(2 * keys.length);
    for (let i = 0; i < keys.length; i++) {
      const key = keys[i] ?? 0;
      if (key === 0) continue;
      const slot = this.slotOf(key);
      this.keys[slot] = key;
      this.numbers[slot] = numbers[i] ?? 0;
    }
  }
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
