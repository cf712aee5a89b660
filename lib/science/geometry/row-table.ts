import { eachStretch, type Solids } from "./column-solids";
import { at } from "./mesh";

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
  for (let i = 0; i < radiiMm.length; i++) {
    const last = solidRows(solids, i * angles + angles - 1, fromMm, step, rows, new Uint8Array(rows));
    let before: Uint8Array = last;
    let [now, spare] = [new Uint8Array(rows), new Uint8Array(rows)];
    for (let k = 0; k < angles; k++) {
      solidRows(solids, i * angles + k, fromMm, step, rows, now);
      for (let j = 0; j < rows; j++) {
        if (now[j] !== 1) continue;
        const cell = i * rows + j;
        fill[cell] = at(fill, cell) + 1 / angles;
        if (before[j] === 0) runs[cell] = at(runs, cell) + 1;
      }
      before = now;
      [now, spare] = [spare, now];
    }
  }
  return { radiiMm, heightsMm, fill, runs };
}

function solidRows(
  solids: Solids,
  line: number,
  from: number,
  step: number,
  rows: number,
  out: Uint8Array,
): Uint8Array {
  out.fill(0);
  eachStretch(solids, line, (low, high) => {
    const first = Math.max(0, Math.ceil((low - from) / step - 0.5));
    const last = Math.min(rows - 1, Math.floor((high - from) / step - 0.5));
    for (let j = first; j <= last; j++) out[j] = 1;
  });
  return out;
}
