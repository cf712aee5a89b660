/** Sets of whole numbers from 0 that can be joined: union-find with path halving. */
export class DisjointSets {
  private readonly parents: Int32Array;

  constructor(count: number) {
    this.parents = Int32Array.from({ length: count }, (_, i) => i);
  }

  /** Lowest member of the set that a number belongs to. */
  find(member: number): number {
    let m = member;
    for (;;) {
      const parent = this.parents[m] ?? m;
      if (parent === m) return m;
      const grand = this.parents[parent] ?? parent;
      this.parents[m] = grand;
      m = grand;
    }
  }

  /** Joins the sets of two numbers. */
  join(a: number, b: number): void {
    const [p, q] = [this.find(a), this.find(b)];
    if (p !== q) this.parents[Math.max(p, q)] = Math.min(p, q);
  }
}
