const INITIAL_CAPACITY = 1024;

/**
 * Gives equal positions one vertex number while triangles stream in. Open addressing at a load of at most one half;
 * −0 counts as +0; two positions are equal when all three coordinates are exactly equal (handbook rule: exact triple
 * first, tolerance only afterwards).
 */
export class VertexWeld {
  private positions: Float64Array;
  private table: Int32Array;
  private mask: number;
  private count = 0;
  private readonly bits = new Int32Array(3);
  private readonly floats = new Float32Array(this.bits.buffer);

  /** @param expectedVertices first guess of the number of vertices; the store grows when it is passed */
  constructor(expectedVertices = INITIAL_CAPACITY) {
    this.positions = new Float64Array(3 * Math.max(16, Math.ceil(expectedVertices)));
    let slots = 2 * INITIAL_CAPACITY;
    while (slots < 2 * expectedVertices) slots *= 2;
    this.table = new Int32Array(slots);
    this.mask = slots - 1;
  }

  /** Number of the vertex at x, y, z; a new one where none was there. */
  add(xIn: number, yIn: number, zIn: number): number {
    const x = xIn + 0;
    const y = yIn + 0;
    const z = zIn + 0;
    let slot = this.hash(x, y, z);
    const { table, positions, mask } = this;
    for (;;) {
      const entry = table[slot] ?? 0;
      if (entry === 0) break;
      const start = 3 * (entry - 1);
      if (positions[start] === x && positions[start + 1] === y && positions[start + 2] === z) return entry - 1;
      slot = (slot + 1) & mask;
    }
    return this.insert(slot, x, y, z);
  }

  /** Number of different vertices so far. */
  get size(): number {
    return this.count;
  }

  /** The positions, x y z of each vertex in turn; ends the use of this object. */
  finish(): Float64Array {
    const out = this.positions.slice(0, 3 * this.count);
    this.positions = new Float64Array(0);
    this.table = new Int32Array(0);
    return out;
  }

  private hash(x: number, y: number, z: number): number {
    const { bits, floats } = this;
    floats[0] = x;
    floats[1] = y;
    floats[2] = z;
    let h =
      Math.imul(bits[0] ?? 0, 0x9e3779b1) ^ Math.imul(bits[1] ?? 0, 0x85ebca77) ^ Math.imul(bits[2] ?? 0, 0xc2b2ae3d);
    h ^= h >>> 15;
    h = Math.imul(h, 0x2c1b3c6d);
    h ^= h >>> 13;
    return h & this.mask;
  }

  private insert(slot: number, x: number, y: number, z: number): number {
    const vertex = this.count;
    if (3 * vertex + 3 > this.positions.length) this.growPositions();
    this.positions[3 * vertex] = x;
    this.positions[3 * vertex + 1] = y;
    this.positions[3 * vertex + 2] = z;
    this.table[slot] = vertex + 1;
    this.count = vertex + 1;
    if (2 * this.count > this.table.length) this.growTable();
    return vertex;
  }

  private growPositions(): void {
    const bigger = new Float64Array(Math.ceil(this.positions.length / 3 / 2) * 9);
    bigger.set(this.positions);
    this.positions = bigger;
  }

  private growTable(): void {
    const table = new Int32Array(2 * this.table.length);
    this.table = table;
    this.mask = table.length - 1;
    for (let vertex = 0; vertex < this.count; vertex++) {
      const start = 3 * vertex;
      const { positions } = this;
      let slot = this.hash(positions[start] ?? 0, positions[start + 1] ?? 0, positions[start + 2] ?? 0);
      while (table[slot] !== 0) slot = (slot + 1) & this.mask;
      table[slot] = vertex + 1;
    }
  }
}
