import { rowsOf } from "@/lib/science/statistics/cell-effects";
import { gather } from "@/lib/science/statistics/descriptive";
import { fitLine, type LineFit } from "@/lib/science/statistics/line-fit";
import { numbered } from "@/lib/science/statistics/robust-errors";
import { MINIMUM } from "@/lib/science/statistics/minimum-counts";

/** Which way an effect points over all entries together, and within each cell by itself. */
export interface Directions {
  /** Slope of the trait alone over all entries of one baseline unit together, seasons and benches forgotten. */
  readonly pooled: number | undefined;
  /** Slope of the trait alone with one level a cell. */
  readonly within: number | undefined;
  /** Cells with five entries or more in which the trait varies: how many point down, how many up. */
  readonly down: number;
  readonly up: number;
}

/** Which group each row is of, 0..count − 1; and the rows of each group. */
export interface Groups {
  readonly index: Int32Array;
  readonly count: number;
  readonly rows: readonly (readonly number[])[];
}

/** Groups by label, in order of appearance. */
export function groupsOf(labels: readonly string[]): Groups {
  const { index, count } = numbered(labels);
  return { index, count, rows: rowsOf(index, count) };
}

/**
 * The trait alone, pooled and within cells: where their signs differ, a comparison over all entries misleads (E. H.
 * Simpson, J. R. Stat. Soc. B 13 (1951) 238). Slopes in the unit of y per unit of x; undefined where x doesn't vary.
 */
export function directionsOf(x: ArrayLike<number>, y: ArrayLike<number>, cells: Groups, baselines: Groups): Directions {
  const ofCells = linesOf(x, y, cells).filter(({ n }) => n >= MINIMUM.correlation);
  return {
    pooled: commonSlope(linesOf(x, y, baselines)),
    within: commonSlope(linesOf(x, y, cells)),
    down: ofCells.filter(({ slope }) => slope < 0).length,
    up: ofCells.filter(({ slope }) => slope > 0).length,
  };
}

/** The line of every group in which x varies. */
function linesOf(x: ArrayLike<number>, y: ArrayLike<number>, { rows }: Groups): LineFit[] {
  return rows.flatMap((places) => fitLine(gather(x, places), gather(y, places)) ?? []);
}

/** One slope for groups with a level each: the groups' slopes weighed by their Σ(x − x̄)². */
function commonSlope(lines: readonly LineFit[]): number | undefined {
  const sxx = lines.reduce((total, line) => total + line.sxx, 0);
  return sxx > 0 ? lines.reduce((total, line) => total + line.slope * line.sxx, 0) / sxx : undefined;
}

/** Whether the pooled slope points against the one within cells. */
export function reversed({ pooled, within }: Directions): boolean {
  return pooled !== undefined && within !== undefined && pooled * within < 0;
}
