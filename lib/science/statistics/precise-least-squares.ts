import { add, divide, multiply, negate, value, type DoubleDouble } from "./double-double";

/** Coefficients and errors to about 14 digits also where double precision loses all. */
export interface PreciseFit {
  readonly coefficients: number[];
  readonly standardErrors: number[];
  readonly rss: number;
  readonly residualSd: number;
  readonly dof: number;
}

const ZERO: DoubleDouble = [0, 0];

function dot(x: readonly DoubleDouble[], y: readonly DoubleDouble[]): DoubleDouble {
  return x.reduce<DoubleDouble>((total, v, i) => add(total, multiply(v, y[i] ?? ZERO)), ZERO);
}

function less(x: readonly DoubleDouble[], share: DoubleDouble, y: readonly DoubleDouble[]): DoubleDouble[] {
  return x.map((v, i) => add(v, negate(multiply(share, y[i] ?? ZERO))));
}

/**
 * Least squares by modified Gram–Schmidt (Å. Björck, BIT 7 (1967) 1) in double-double, for ill-conditioned columns such as
 * high powers (form them with `powers`). Undefined for too few rows or a column dependent to 24 digits.
 * @param columns one an effect, as long as y; the constant among them as ones
 */
export function preciseLeastSquares(
  columns: readonly (readonly DoubleDouble[])[],
  y: readonly number[],
): PreciseFit | undefined {
  const p = columns.length;
  const dof = y.length - p;
  if (dof < 1) return undefined;
  const q: DoubleDouble[][] = [];
  const squares: DoubleDouble[] = [];
  const upper = columns.map(() => columns.map(() => ZERO));
  let rest: DoubleDouble[] = y.map((v) => [v, 0]);
  const along: DoubleDouble[] = [];
  for (let k = 0; k < p; k++) {
    const column = columns[k] ?? [];
    let own = [...column];
    q.forEach((direction, j) => {
      const share = divide(dot(direction, own), squares[j] ?? ZERO);
      own = less(own, share, direction);
      const row = upper[j];
      if (row) row[k] = share;
    });
    const square = dot(own, own);
    if (!(value(square) > 1e-48 * value(dot(column, column)))) return undefined;
    const share = divide(dot(own, rest), square);
    rest = less(rest, share, own);
    along.push(share);
    q.push(own);
    squares.push(square);
  }
  const solve = (right: readonly DoubleDouble[]) => {
    const solution = [...right];
    for (let i = p - 1; i >= 0; i--)
      for (let j = i + 1; j < p; j++)
        solution[i] = add(solution[i] ?? ZERO, negate(multiply(upper[i]?.[j] ?? ZERO, solution[j] ?? ZERO)));
    return solution;
  };
  const coefficients = solve(along).map(value);
  const rss = value(dot(rest, rest));
  // Row i of U⁻¹, with D⁻¹ between the two: the diagonal of (XᵀX)⁻¹.
  const unit = columns.map((_, j) => solve(columns.map((__, i) => (i === j ? [1, 0] : ZERO))));
  const standardErrors = columns.map((_, i) => {
    const diagonal = unit.reduce<DoubleDouble>((total, column, j) => {
      const entry = column[i] ?? ZERO;
      return add(total, divide(multiply(entry, entry), squares[j] ?? ZERO));
    }, ZERO);
    return Math.sqrt((value(diagonal) * rss) / dof);
  });
  return { coefficients, standardErrors, rss, residualSd: Math.sqrt(rss / dof), dof };
}
