import { at, squaredDeviations, sum } from "./descriptive";
import { fUpper } from "./chi-square-and-f";

/** Ordinary least squares of y on columns; units follow y and the columns. */
export interface LeastSquares {
  readonly coefficients: Float64Array;
  readonly standardErrors: Float64Array;
  readonly residuals: Float64Array;
  /** Diagonal of the hat matrix. */
  readonly leverages: Float64Array;
  /** (XᵀX)⁻¹, row by row. */
  readonly inverse: readonly Float64Array[];
  readonly rss: number;
  readonly residualSd: number;
  readonly dof: number;
  /** Against the mean where a constant is among the columns, else against 0. */
  readonly r2: number;
  /** Of all columns but the constant; Infinity for an exact fit. */
  readonly f: number;
  readonly fP: number;
}

/** Why there is no fit: a column that those before it already say, or too few rows. */
export interface NoFit {
  readonly refused: "dependent-column" | "too-few-rows";
  /** Index of the dependent column. */
  readonly column?: number;
}

/** Share of a column that must stand apart from those before it; a dependent one leaves about 1e-16. */
const APART_MIN = 1e-13;

/**
 * Least squares by Householder reflections (G. H. Golub, Numer. Math. 7 (1965) 206), never by normal equations. About 6
 * digits on the hardest data of NIST's reference sets: see precise-least-squares for those.
 * @param columns one an effect, the constant among them as ones, all as long as y
 * @param hasConstant whether a constant is in their span
 * @throws RangeError when lengths differ
 */
export function leastSquares(
  columns: readonly ArrayLike<number>[],
  y: ArrayLike<number>,
  hasConstant: boolean,
): LeastSquares | NoFit {
  const [n, p] = [y.length, columns.length];
  if (columns.some((column) => column.length !== n)) throw new RangeError("columns and y differ in length");
  if (n <= p) return { refused: "too-few-rows" };
  const a = columns.map((column) => Float64Array.from(column));
  const right = Float64Array.from(y);
  const reflectors: Float64Array[] = [];
  for (let k = 0; k < p; k++) {
    const column = a[k] ?? new Float64Array(n);
    const before = Math.sqrt(dot(columns[k] ?? column, columns[k] ?? column, 0));
    const below = Math.sqrt(dot(column, column, k));
    if (!(below > APART_MIN * before)) return { refused: "dependent-column", column: k };
    const v = new Float64Array(n);
    for (let i = k; i < n; i++) v[i] = at(column, i);
    v[k] = at(v, k) + (at(v, k) < 0 ? -below : below);
    const square = dot(v, v, k);
    for (const other of [...a.slice(k), right]) reflect(v, square, other, k);
    reflectors.push(v);
  }
  const inverseR = invertUpper(a, p);
  const coefficients = new Float64Array(p);
  for (let i = 0; i < p; i++)
    for (let j = i; j < p; j++) coefficients[i] = at(coefficients, i) + at(inverseR[i] ?? [], j) * at(right, j);
  const residuals = new Float64Array(n);
  for (let i = p; i < n; i++) residuals[i] = at(right, i);
  for (let k = p - 1; k >= 0; k--) {
    const v = reflectors[k] ?? residuals;
    reflect(v, dot(v, v, k), residuals, k);
  }
  return summarise(columns, y, hasConstant, coefficients, residuals, inverseR, dot(right, right, p));
}

function dot(x: ArrayLike<number>, y: ArrayLike<number>, from: number): number {
  let total = 0;
  for (let i = from; i < x.length; i++) total += at(x, i) * at(y, i);
  return total;
}

/** `square` is v·v from there on. */
function reflect(v: Float64Array, square: number, x: Float64Array, from: number): void {
  const share = (2 * dot(v, x, from)) / square;
  for (let i = from; i < x.length; i++) x[i] = at(x, i) - share * at(v, i);
}

/** Inverse of the upper triangle; a[j][i] holds R's row i, column j. */
function invertUpper(a: readonly Float64Array[], p: number): Float64Array[] {
  const r = (i: number, j: number) => at(a[j] ?? [], i);
  const inverse = Array.from({ length: p }, () => new Float64Array(p));
  for (let j = 0; j < p; j++) {
    for (let i = j; i >= 0; i--) {
      let value = i === j ? 1 : 0;
      for (let k = i + 1; k <= j; k++) value -= r(i, k) * at(inverse[k] ?? [], j);
      const row = inverse[i];
      if (row) row[j] = value / r(i, i);
    }
  }
  return inverse;
}

function summarise(
  columns: readonly ArrayLike<number>[],
  y: ArrayLike<number>,
  hasConstant: boolean,
  coefficients: Float64Array,
  residuals: Float64Array,
  inverseR: readonly Float64Array[],
  rss: number,
): LeastSquares {
  const [n, p] = [y.length, columns.length];
  const dof = n - p;
  const variance = rss / dof;
  const inverse = inverseR.map((row) => Float64Array.from(inverseR, (other) => dot(row, other, 0)));
  const total = hasConstant ? (squaredDeviations(y) ?? 0) : sum(Array.from(y, (value) => value * value));
  const effects = p - (hasConstant ? 1 : 0);
  const f = rss === 0 ? Infinity : (total - rss) / effects / variance;
  return {
    coefficients,
    standardErrors: Float64Array.from(inverse, (row, i) => Math.sqrt(variance * at(row, i))),
    residuals,
    leverages: leveragesOf(columns, inverseR, n),
    inverse,
    rss,
    residualSd: Math.sqrt(variance),
    dof,
    r2: total === 0 ? Number.NaN : 1 - rss / total,
    f,
    fP: effects === 0 ? Number.NaN : fUpper(Math.max(0, f), effects, dof),
  };
}

/** Squares of XR⁻¹'s rows, column by column; R⁻¹ is upper triangular. */
function leveragesOf(
  columns: readonly ArrayLike<number>[],
  inverseR: readonly Float64Array[],
  n: number,
): Float64Array {
  const leverages = new Float64Array(n);
  const projected = new Float64Array(n);
  for (let j = 0; j < columns.length; j++) {
    projected.fill(0);
    for (let k = 0; k <= j; k++) {
      const [column, weight] = [columns[k] ?? projected, at(inverseR[k] ?? [], j)];
      for (let i = 0; i < n; i++) projected[i] = at(projected, i) + at(column, i) * weight;
    }
    for (let i = 0; i < n; i++) leverages[i] = at(leverages, i) + at(projected, i) ** 2;
  }
  return leverages;
}
