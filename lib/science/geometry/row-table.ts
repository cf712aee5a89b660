import { eachStretch, type Solids } from "./column-solids";

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
  const step = (toMm - fromMm) / rows;
  const heightsMm = Float64Array.from({ length: rows }, (_, j) => fromMm + (j + 0.5) * step);
  const fill = new Float64Array(radiiMm.length * rows);
  const runs = new Int32Array(radiiMm.length * rows);
  // The latest line on which each row was solid: a run begins where that isn't the line before.
  const latest = new Int32Array(rows);
  for (let i = 0; i < radiiMm.length; i++) {
    latest.fill(-2);
    const each = (line: number, visit: (row: number) => void) =>
      eachStretch(solids, line, (low, high) => {
        const first = Math.max(0, Math.ceil((low - fromMm) / step - 0.5));
        const last = Math.min(rows - 1, Math.floor((high - fromMm) / step - 0.5));
        for (let j = first; j <= last; j++) visit(j);
      });
    each(i * angles + angles - 1, (j) => (latest[j] = -1));
    for (let k = 0; k < angles; k++) {
      each(i * angles + k, (j) => {
        const cell = i * rows + j;
        fill[cell] = (fill[cell] ?? 0) + 1;
        if (latest[j] !== k - 1 && latest[j] !== k) runs[cell] = (runs[cell] ?? 0) + 1;
        latest[j] = k;
      });
    }
  }
  return { radiiMm, heightsMm, fill: fill.map((count) => count / angles), runs };
}
