import type { Columns } from "./columns";

/** Solid stretches of lines: pairs of heights (from, to), mm, sorted, apart from each other. */
export interface Solids {
  readonly columns: Columns;
  /** First number of each line in `ends`; one more entry closes the last. */
  readonly starts: Int32Array;
  readonly ends: Float64Array;
  /** Lines where the surface didn't close, so that a neighbour's stretches stand in. */
  readonly mended: number;
}

/**
 * Where the lines run inside the shells that `include` marks (winding not zero, so overlapping and inverted shells
 * count once). A line through a hole in the mesh has no closed winding: with an even number of crossings they are taken
 * in turn, else the line borrows from its neighbour at the same radius. Gaps and stretches below `tiny` mm vanish.
 */
export function solidStretches(columns: Columns, include: (shell: number) => boolean, tiny: number): Solids {
  const { grid, starts: from, heights, marks } = columns;
  const lines = from.length - 1;
  const starts = new Int32Array(lines + 1);
  const ends: number[] = [];
  const used: number[] = [];
  let mended = 0;
  let previous: number[] = [];
  for (let line = 0; line < lines; line++) {
    if (line % grid.angles === 0) previous = [];
    used.length = 0;
    let balance = 0;
    for (let i = from[line] ?? 0; i < (from[line + 1] ?? 0); i++) {
      const mark = marks[i] ?? 0;
      if (!include(mark >> 1)) continue;
      used.push(i);
      balance += (mark & 1) === 0 ? 1 : -1;
    }
    let stretches = previous;
    if (balance === 0 || used.length % 2 === 0) {
      stretches = lineStretches(used, heights, balance === 0 ? marks : undefined, tiny);
    } else mended++;
    previous = stretches;
    for (const value of stretches) ends.push(value);
    starts[line + 1] = ends.length;
  }
  return { columns, starts, ends: Float64Array.from(ends), mended };
}

/** Stretches of one line by winding, or by turns where `marks` is undefined. */
function lineStretches(used: number[], heights: Float64Array, marks: Int32Array | undefined, tiny: number): number[] {
  const out: number[] = [];
  let winding = 0;
  let begin = 0;
  for (const i of used) {
    const height = heights[i] ?? 0;
    const before = winding;
    winding += marks ? (((marks[i] ?? 0) & 1) === 0 ? 1 : -1) : winding === 0 ? 1 : -1;
    if (before === 0) begin = height;
    if (winding !== 0) continue;
    const last = out.length - 1;
    if (out.length > 0 && begin - (out[last] ?? 0) < tiny) out[last] = height;
    else if (height - begin >= tiny) out.push(begin, height);
  }
  return out;
}

/** Calls `visit` with each stretch of a line. */
export function eachStretch(solids: Solids, line: number, visit: (fromMm: number, toMm: number) => void): void {
  for (let i = solids.starts[line] ?? 0; i < (solids.starts[line + 1] ?? 0); i += 2) {
    visit(solids.ends[i] ?? 0, solids.ends[i + 1] ?? 0);
  }
}
