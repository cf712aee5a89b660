/**
 * Gives equal positions one vertex number while triangles stream in as the 32-bit patterns of their coordinates. Two
 * finite floats are equal exactly when their bits are, once −0 has become +0, so patterns are compared, and kept, as
 * they are. Open addressing at a load of at most one half.
 */
export class BitWeld {
  private words: Int32Array;
  private table: Int32Array;
  private mask: number;
  private count = 0;

  /** @param expectedVertices first guess of the number of vertices; the store grows when it is passed */
  constructor(expectedVertices: number) {
    this.words = new Int32Array(3 * Math.max(16, Math.ceil(expectedVertices)));
    let slots = 2048;
    while (slots < 2 * expectedVertices) slots *= 2;
    this.table = new Int32Array(slots);
    this.mask = slots - 1;
  }

  /** Number of the vertex whose coordinates have these bits; a new one where none was there. −0 is handed in as 0. */
  add(x: number, y: number, z: number): number {
    const { table, words, mask } = this;
    let slot = hashOf(x, y, z) & mask;
    for (;;) {
      const entry = table[slot] ?? 0;
      if (entry === 0) break;
      const start = 3 * entry - 3;
      if (words[start] === x && words[start + 1] === y && words[start + 2] === z) return entry - 1;
      slot = (slot + 1) & mask;
    }
    return this.insert(slot, x, y, z);
  }

  /** The positions, x y z of each vertex in turn; ends the use of this object. */
  finish(): Float64Array {
    this.table = new Int32Array(0);
    const out = new Float64Array(new Float32Array(this.words.buffer, 0, 3 * this.count));
    this.words = new Int32Array(0);
    return out;
  }

  private insert(slot: number, x: number, y: number, z: number): number {
    const vertex = this.count;
    if (3 * vertex + 3 > this.words.length) {
      const bigger = new Int32Array(3 * Math.ceil(this.words.length / 2));
      bigger.set(this.words);
      this.words = bigger;
    }
    this.words[3 * vertex] = x;
    this.words[3 * vertex + 1] = y;
    this.words[3 * vertex + 2] = z;
    this.table[slot] = vertex + 1;
    this.count = vertex + 1;
    if (2 * this.count > this.table.length) this.growTable();
    return vertex;
  }

  private growTable(): void {
    const table = new Int32Array(2 * this.table.length);
    this.table = table;
    this.mask = table.length - 1;
    const { words, mask } = this;
    for (let vertex = 0; vertex < this.count; vertex++) {
      let slot = hashOf(words[3 * vertex] ?? 0, words[3 * vertex + 1] ?? 0, words[3 * vertex + 2] ?? 0) & mask;
      while (table[slot] !== 0) slot = (slot + 1) & mask;
      table[slot] = vertex + 1;
    }
  }
}

function hashOf(x: number, y: number, z: number): number {
  let h = Math.imul(x, 0x9e3779b1) ^ Math.imul(y, 0x85ebca77) ^ Math.imul(z, 0xc2b2ae3d);
  h ^= h >>> 15;
  h = Math.imul(h, 0x2c1b3c6d);
  return h ^ (h >>> 13);
}
