/** One refused row: its physical line (from 1) and why. */
export interface RefusedRow {
  readonly line: number;
  readonly reason: string;
}

const KEPT_MAX = 1000;

/** Counts every refused row and keeps the first thousand. */
export class RefusedRows {
  readonly kept: RefusedRow[] = [];
  count = 0;

  add(line: number, reason: string): void {
    this.count += 1;
    if (this.kept.length < KEPT_MAX) this.kept.push({ line, reason });
  }
}
