import { at } from "./descriptive";
import { leastSquares, type LeastSquares } from "./least-squares";
import { createRandom } from "./random";

function quadratic(inverse: readonly Float64Array[], scores: readonly Float64Array[], j: number): number {
  const row = inverse[j] ?? new Float64Array(0);
  return scores.reduce((total, score) => total + row.reduce((part, v, k) => part + v * at(score, k), 0) ** 2, 0);
}

/** Standard errors that allow a variance of its own for each row, HC3 (J. G. MacKinnon, H. White, J. Econom. 29 (1985) 305). */
export function hc3Errors(columns: readonly ArrayLike<number>[], fit: LeastSquares): Float64Array {
  const scores = Array.from(fit.residuals, (residual, i) =>
    Float64Array.from(columns, (column) => (at(column, i) * residual) / (1 - at(fit.leverages, i))),
  );
  return Float64Array.from(columns, (_, j) => Math.sqrt(quadratic(fit.inverse, scores, j)));
}

/** Sums of x·residual over each cluster; clusters numbered in order of appearance. */
function clusterScores(
  columns: readonly ArrayLike<number>[],
  residuals: ArrayLike<number>,
  cluster: ArrayLike<number>,
  count: number,
) {
  const scores = Array.from({ length: count }, () => new Float64Array(columns.length));
  for (let i = 0; i < residuals.length; i++) {
    const score = scores[at(cluster, i)];
    if (!score) continue;
    const residual = at(residuals, i);
    for (let k = 0; k < columns.length; k++) score[k] = at(score, k) + at(columns[k] ?? [], i) * residual;
  }
  return scores;
}

/** Numbers labels 0, 1, 2 … in order of appearance. */
export function numbered(labels: readonly string[]): { index: Int32Array; count: number } {
  const seen = new Map<string, number>();
  const index = new Int32Array(labels.length);
  for (let i = 0; i < labels.length; i++) {
    const label = labels[i] ?? "";
    let known = seen.get(label);
    if (known === undefined) {
      known = seen.size;
      seen.set(label, known);
    }
    index[i] = known;
  }
  return { index, count: seen.size };
}

/**
 * Cluster-robust standard errors, CR1: the sandwich times G/(G − 1)·(n − 1)/(n − k), for t with G − 1 degrees of freedom
 * (A. C. Cameron, D. L. Miller, J. Hum. Resour. 50 (2015) 317, eq. 11–12). Too small under about thirty clusters: use the
 * wild bootstrap there. `absorbed`: cell effects taken out beforehand. Undefined for fewer than two clusters.
 */
export function clusterErrors(
  columns: readonly ArrayLike<number>[],
  fit: LeastSquares,
  clusters: readonly string[],
  absorbed = 0,
) {
  const { index, count } = numbered(clusters);
  if (count < 2) return undefined;
  const [n, k] = [fit.residuals.length, columns.length + absorbed];
  const factor = (count / (count - 1)) * ((n - 1) / (n - k));
  const scores = clusterScores(columns, fit.residuals, index, count);
  const errors = Float64Array.from(columns, (_, j) => Math.sqrt(factor * quadratic(fit.inverse, scores, j)));
  return { errors, dof: count - 1, clusters: count };
}

const ENUMERATE_UP_TO = 11;

/**
 * p-value of one coefficient by the wild cluster bootstrap with the null imposed and signs ±1 a cluster (A. C. Cameron,
 * J. B. Gelbach, D. L. Miller, Rev. Econ. Stat. 90 (2008) 414): the share of |t*| ≥ |t|, the sample itself among them. Up
 * to 11 clusters all 2^G signs are run through; above, `draws` are taken (one word a cluster and draw, its top bit).
 * Undefined when there is no fit or fewer than two clusters.
 */
export function wildClusterP(
  columns: readonly ArrayLike<number>[],
  y: ArrayLike<number>,
  effect: number,
  clusters: readonly string[],
  { seed, draws = 1999 }: { seed: number; draws?: number },
): { p: number; draws: number } | undefined {
  const { index, count } = numbered(clusters);
  const others = columns.filter((_, j) => j !== effect);
  const tOf = (values: ArrayLike<number>) => {
    const fit = leastSquares(columns, values, false);
    if ("refused" in fit) return undefined;
    const errors = clusterErrors(columns, fit, clusters)?.errors;
    return errors && Math.abs(at(fit.coefficients, effect)) / at(errors, effect);
  };
  const observed = tOf(y);
  const nullFit = others.length === 0 ? { residuals: Float64Array.from(y) } : leastSquares(others, y, false);
  if (observed === undefined || "refused" in nullFit || count < 2) return undefined;
  const random = createRandom(seed);
  const all = count <= ENUMERATE_UP_TO;
  const total = all ? 2 ** count : draws;
  let reached = all ? 0 : 1;
  for (let draw = 0; draw < total; draw++) {
    const signs = Float64Array.from({ length: count }, (_, g) =>
      (all ? (draw >> g) & 1 : random.word() >>> 31) ? -1 : 1,
    );
    const sample = Float64Array.from(
      nullFit.residuals,
      (residual, i) => at(y, i) + residual * (at(signs, at(index, i)) - 1),
    );
    const t = tOf(sample);
    if (t !== undefined && t >= observed * (1 - 1e-10)) reached += 1;
  }
  return { p: reached / (all ? total : total + 1), draws: total };
}

/** Variance inflation of each column: 1/(1 − R²) of it on the others (constant included by `hasConstant`); Infinity if dependent. */
export function varianceInflation(columns: readonly ArrayLike<number>[], hasConstant: boolean): number[] {
  return columns.map((column, j) => {
    const others = columns.filter((_, k) => k !== j);
    if (others.length === 0) return 1;
    const fit = leastSquares(others, column, hasConstant);
    return "refused" in fit ? Infinity : 1 / (1 - fit.r2);
  });
}
