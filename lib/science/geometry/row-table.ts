import type { Solids } from "./column-solids";

/** Circles around the axis, by radius and height: how much of each is solid, and in how many runs. */
export interface RowTable {
  readonly radiiMm: Float64Array;
  readonly heightsMm: Float64Array;
  /** Solid share 0–1 of the circle at radius i and height j: index i × heights + j. */
  readonly fill: Float64Array;
  /** Number of separate solid runs on the circle (0 on a full one). */
  readonly runs: Int32Array;
}

/** Cuts the solids at `rows` heights spread over `fromMm`…`toMm` (middles of equal steps). */
export function rowTable(solids: Solids, fromMm: number, toMm: number, rows: number): RowTable {
  const { radiiMm, angles } = solids.columns.grid;
  const { starts, ends } = solids;
  const step = (toMm - fromMm) / rows;
  const heightsMm = Float64Array.from({ length: rows }, (_, j) => fromMm + (j + 0.5) * step);
  const fill = new Float64Array(radiiMm.length * rows);
  const runs = new Int32Array(radiiMm.length * rows);
  // The latest line on which each row was solid: a run begins where that isn't the line before.
  const latest = new Int32Array(rows);
  for (let i = 0; i < radiiMm.length; i++) {
    latest.fill(-2);
    // −1 stands for the last line, which is the first one's neighbour. Written out: this runs for every solid cell.
    for (let k = -1; k < angles; k++) {
      const line = i * angles + (k < 0 ? angles - 1 : k);
      for (let e = starts[line] ?? 0; e < (starts[line + 1] ?? 0); e += 2) {
        const first = Math.max(0, Math.ceil(((ends[e] ?? 0) - fromMm) / step - 0.5));
        const last = Math.min(rows - 1, Math.floor(((ends[e + 1] ?? 0) - fromMm) / step - 0.5));
        for (let j = first; j <= last; j++) {
          const before = latest[j] ?? 0;
          latest[j] = k;
          if (k < 0) continue;
          const cell = i * rows + j;
          fill[cell] = (fill[cell] ?? 0) + 1;
          if (before !== k - 1 && before !== k) runs[cell] = (runs[cell] ?? 0) + 1;
        }
      }
    }
  }
  return { radiiMm, heightsMm, fill: fill.map((count) => count / angles), runs };
}
