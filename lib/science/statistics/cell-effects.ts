import { at, gather, mean } from "./descriptive";
import { leastSquares, type LeastSquares, type NoFit } from "./least-squares";
import { numbered } from "./robust-errors";

/** A fit in which each cell (season, bench version, protocol) has a level of its own. */
export interface CellFit {
  readonly fit: LeastSquares;
  /** The columns less their cell means: what robust errors are taken from. */
  readonly within: readonly Float64Array[];
  readonly cells: number;
  /** Cells in which each column varies: only these say anything of it. */
  readonly informative: readonly number[];
}

/** Fewest residual degrees of freedom for a fit that is shown (house rule, no source). */
export const DOF_MIN = 5;

/**
 * Regression with one effect a cell, by taking cell means out of y and columns (R. Frisch, F. V. Waugh, Econometrica 1
 * (1933) 387): same slopes as with a dummy a cell, and degrees of freedom less the cells. Refused when a column varies in
 * no cell, depends on others, or too few rows are left.
 */
export function fitWithinCells(
  columns: readonly ArrayLike<number>[],
  y: ArrayLike<number>,
  cells: readonly string[],
): CellFit | NoFit {
  const { index, count } = numbered(cells);
  const rows = rowsOf(index, count);
  const within = columns.map((column) => lessCellMeans(column, rows));
  const informative = columns.map((column) => varyingCells(column, rows));
  const unseen = informative.indexOf(0);
  if (unseen >= 0) return { refused: "dependent-column", column: unseen };
  if (y.length - columns.length - count < DOF_MIN) return { refused: "too-few-rows" };
  const fit = leastSquares(within, lessCellMeans(y, rows), false);
  if ("refused" in fit) return fit;
  const dof = fit.dof - count;
  const scale = Math.sqrt(fit.dof / dof);
  const standardErrors = fit.standardErrors.map((error) => error * scale);
  return {
    fit: { ...fit, dof, standardErrors, residualSd: fit.residualSd * scale },
    within,
    cells: count,
    informative,
  };
}

/** The rows of each group, ascending. */
export function rowsOf(index: Int32Array, count: number): number[][] {
  const rows = Array.from({ length: count }, (): number[] => []);
  for (let i = 0; i < index.length; i++) rows[at(index, i)]?.push(i);
  return rows;
}

function lessCellMeans(values: ArrayLike<number>, cells: readonly (readonly number[])[]): Float64Array {
  const result = new Float64Array(values.length);
  for (const rows of cells) {
    const centre = mean(gather(values, rows)) ?? 0;
    for (const i of rows) result[i] = at(values, i) - centre;
  }
  return result;
}

function varyingCells(values: ArrayLike<number>, cells: readonly (readonly number[])[]): number {
  return cells.filter((rows) => rows.some((i) => at(values, i) !== at(values, rows[0] ?? i))).length;
}
