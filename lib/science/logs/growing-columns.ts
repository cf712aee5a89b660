import { Refusal } from "../refusal";

const ROWS_MAX = 4_000_000;

/** Columns of numbers that grow a row at a time, by doubling, up to four million rows. */
export class GrowingColumns {
  private data: Float64Array[];
  private capacity = 4096;
  rows = 0;

  constructor(private readonly width: number) {
    this.data = Array.from({ length: width }, () => new Float64Array(this.capacity));
  }

  /** Takes the first `width` numbers of a row. @throws Refusal beyond four million rows. */
  add(row: Float64Array): void {
    if (this.rows === this.capacity) this.grow();
    const at = this.rows++;
    for (let c = 0; c < this.width; c++) {
      const column = this.data[c];
      if (column) column[at] = row[c] ?? Number.NaN;
    }
  }

  /** Takes the last row back. */
  dropLast(): void {
    this.rows = Math.max(0, this.rows - 1);
  }

  /** The columns as far as they are filled; no copy. */
  columns(): Float64Array[] {
    return this.data.map((column) => column.subarray(0, this.rows));
  }

  private grow(): void {
    if (this.rows >= ROWS_MAX) throw new Refusal("too-many-rows", `a log may have ${ROWS_MAX} rows`);
    this.capacity = Math.min(2 * this.capacity, ROWS_MAX);
    for (let c = 0; c < this.width; c++) {
      const next = new Float64Array(this.capacity);
      const old = this.data[c];
      if (old) next.set(old);
      this.data[c] = next;
    }
  }
}
