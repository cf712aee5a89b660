/** A list of doubles that grows in one typed array, for meshes whose size is not known beforehand. */
export class GrowingFloats {
  private values = new Float64Array(3072);
  length = 0;

  /** Appends three numbers. */
  push3(a: number, b: number, c: number): void {
    if (this.length + 3 > this.values.length) {
      const bigger = new Float64Array(2 * this.values.length);
      bigger.set(this.values);
      this.values = bigger;
    }
    this.values[this.length] = a;
    this.values[this.length + 1] = b;
    this.values[this.length + 2] = c;
    this.length += 3;
  }

  /** Value at an index that was pushed; NaN beyond. */
  get(index: number): number {
    return index < this.length ? (this.values[index] ?? NaN) : NaN;
  }

  /** The values, without spare room. */
  toFloat64(): Float64Array {
    return this.values.slice(0, this.length);
  }

  /** The values as whole numbers. */
  toUint32(): Uint32Array {
    return Uint32Array.from(this.values.subarray(0, this.length));
  }
}
