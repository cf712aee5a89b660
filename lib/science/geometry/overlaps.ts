import type { Columns } from "./columns";
import { DisjointSets } from "./disjoint-sets";

/** Which shells share space, as the lines of a grid see it. */
export interface OverlapReport {
  /** Number of the body of each shell: shells that share space, or lie inside each other, are one body. */
  readonly bodyOf: Int32Array;
  readonly bodyCount: number;
  /** Lines on which two outward shells, or one shell with itself, cover the same stretch. */
  readonly overlapLines: number;
  /** Length of line, mm, on which a shell is inverted with nothing around it, so that it isn't a hollow of another. */
  readonly invertedMm: Float64Array;
  /** Length of line, mm, inside each shell, whichever way it faces. */
  readonly insideMm: Float64Array;
}

/**
 * Walks every line and joins shells that are both solid over more than `tiny` mm. A winding above one is an overlap.
 * Solids that only touch stay apart.
 */
export function shellOverlaps(columns: Columns, shells: number, tiny: number): OverlapReport {
  const sets = new DisjointSets(shells);
  const { starts, heights, marks } = columns;
  let overlapLines = 0;
  const invertedMm = new Float64Array(shells);
  const insideMm = new Float64Array(shells);
  const windings = new Map<number, number>();
  for (let line = 0; line + 1 < starts.length; line++) {
    windings.clear();
    let winding = 0;
    let over = false;
    const to = starts[line + 1] ?? 0;
    if (!balanced(marks, starts[line] ?? 0, to)) continue;
    for (let i = starts[line] ?? 0; i < to; i++) {
      const mark = marks[i] ?? 0;
      const step = (mark & 1) === 0 ? 1 : -1;
      const shell = mark >> 1;
      const mine = (windings.get(shell) ?? 0) + step;
      if (mine === 0) windings.delete(shell);
      else windings.set(shell, mine);
      winding += step;
      const length = i + 1 < to ? (heights[i + 1] ?? 0) - (heights[i] ?? 0) : 0;
      if (length <= tiny) continue;
      if (winding > 1) over = true;
      for (const [other, turns] of windings) {
        insideMm[other] = (insideMm[other] ?? 0) + length;
        if (turns < 0 && winding < 0) invertedMm[other] = (invertedMm[other] ?? 0) + length;
      }
      if (windings.size < 2) continue;
      let first = -1;
      for (const other of windings.keys()) {
        if (first < 0) first = other;
        else sets.join(first, other);
      }
    }
    if (over) overlapLines++;
  }
  const bodyOf = new Int32Array(shells);
  let bodyCount = 0;
  for (let shell = 0; shell < shells; shell++) {
    const root = sets.find(shell);
    bodyOf[shell] = root === shell ? bodyCount++ : (bodyOf[root] ?? 0);
  }
  return { bodyOf, bodyCount, overlapLines, invertedMm, insideMm };
}

/** A line through a hole doesn't tell what is inside; it has no say. */
function balanced(marks: Int32Array, from: number, to: number): boolean {
  let sum = 0;
  for (let i = from; i < to; i++) sum += ((marks[i] ?? 0) & 1) === 0 ? 1 : -1;
  return sum === 0;
}
