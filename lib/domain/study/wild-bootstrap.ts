import { at } from "@/lib/science/statistics/descriptive";
import { leastSquares } from "@/lib/science/statistics/least-squares";
import { createRandom } from "@/lib/science/statistics/random";

/** The regression whose effect is tried: columns and y less their cell means, and how rows fall into cells and clusters. */
export interface BootstrapInput {
  readonly columns: readonly ArrayLike<number>[];
  readonly y: ArrayLike<number>;
  /** Cell of each row, 0..cells − 1. */
  readonly cell: Int32Array;
  readonly cells: number;
  readonly cluster: Int32Array;
  readonly clusters: number;
  /** (XᵀX)⁻¹ of the columns. */
  readonly inverse: readonly Float64Array[];
  /** t of each effect with its cluster error, CR1. */
  readonly t: readonly number[];
}

const ENUMERATE_UP_TO = 11;
export const DRAWS = 1999;

/**
 * Wild cluster bootstrap of one effect with the null imposed and signs ±1 a cluster (A. C. Cameron, J. B. Gelbach,
 * D. L. Miller, Rev. Econ. Stat. 90 (2008) 414), cell effects among the nuisance. What changes with the signs are sums
 * over clusters alone, so a draw costs clusters × columns, not rows. Gives the same t* as refitting each draw.
 * @returns p, and the 95 % quantile of |t*|, by which estimate ± quantile · error is the interval that agrees with p;
 * undefined when the others alone have no fit
 */
export function wildBootstrap(
  input: BootstrapInput,
  effect: number,
  seed: number,
): { p: number; quantile: number; draws: number } | undefined {
  const { clusters, cell, cells, columns, y, inverse } = input;
  const others = columns.filter((_, j) => j !== effect);
  const under = others.length === 0 ? { residuals: Float64Array.from(y) } : leastSquares(others, y, false);
  if ("refused" in under) return undefined;
  const sums = clusterSums(input, effect, under.residuals);
  const width = columns.length + cells;
  const counts = new Float64Array(cells);
  for (const c of cell) counts[c] = at(counts, c) + 1;
  const random = createRandom(seed);
  const all = clusters <= ENUMERATE_UP_TO;
  const draws = all ? 2 ** clusters : DRAWS;
  const observed = Math.abs(input.t[effect] ?? Number.NaN);
  const reachedT = new Float64Array(draws);
  const own = inverse[effect] ?? new Float64Array(columns.length);
  for (let draw = 0; draw < draws; draw++) {
    const signs = Float64Array.from({ length: clusters }, (_, g) =>
      (all ? (draw >> g) & 1 : random.word() >>> 31) ? -1 : 1,
    );
    const total = new Float64Array(width);
    let slope = 0;
    sums.forEach((sum, g) => {
      slope += at(signs, g) * sum.own;
      for (let k = 0; k < width; k++) total[k] = at(total, k) + at(signs, g) * at(sum.right, k);
    });
    const fitted = Float64Array.from({ length: width }, (_, k) =>
      k < columns.length
        ? (inverse[k] ?? own).reduce((part, value, j) => part + value * at(total, j), 0)
        : at(total, k) / at(counts, k - columns.length),
    );
    let spread = 0;
    sums.forEach((sum, g) => {
      const score = fitted.reduce((part, value, k) => part - value * at(sum.left, k), at(signs, g) * sum.own);
      spread += score * score;
    });
    reachedT[draw] = Math.abs(slope) / Math.sqrt(spread);
  }
  // The sandwich's small-sample factor stands in the observed t; a draw's t needs the same.
  const scaled = reachedT.map((t) => t / Math.sqrt(smallSampleFactor(input)));
  const reached = scaled.filter((t) => t >= observed * (1 - 1e-10)).length;
  const sorted = scaled.filter((t) => !Number.isNaN(t)).sort();
  const quantile = sorted[Math.min(sorted.length - 1, Math.ceil(0.95 * sorted.length) - 1)] ?? Number.NaN;
  return { p: all ? reached / draws : (reached + 1) / (draws + 1), quantile, draws };
}

/** CR1: G/(G − 1) · (n − 1)/(n − k), cells counted among the k. */
function smallSampleFactor({ y, columns, cells, clusters }: BootstrapInput): number {
  return (clusters / (clusters - 1)) * ((y.length - 1) / (y.length - columns.length - cells));
}

/**
 * Sums of one cluster: `own`, Σ x̃·e of the effect's column x̃ less what the others say of it; `right`, Σ of every
 * column (cells as dummies) times e; `left`, Σ of x̃ times every column.
 */
function clusterSums(input: BootstrapInput, effect: number, residuals: ArrayLike<number>) {
  const { columns, cell, cells, cluster, clusters, inverse } = input;
  const row = inverse[effect] ?? new Float64Array(columns.length);
  const sums = Array.from({ length: clusters }, () => ({
    own: 0,
    right: new Float64Array(columns.length + cells),
    left: new Float64Array(columns.length + cells),
  }));
  for (let i = 0; i < residuals.length; i++) {
    const sum = sums[at(cluster, i)];
    if (!sum) continue;
    const e = at(residuals, i);
    // (XᵀX)⁻¹'s row times x is x̃ over its own sum of squares: the scale falls out of t.
    const apart = columns.reduce((part, column, k) => part + at(row, k) * at(column, i), 0);
    sum.own += apart * e;
    columns.forEach((column, k) => {
      sum.right[k] = at(sum.right, k) + at(column, i) * e;
      sum.left[k] = at(sum.left, k) + at(column, i) * apart;
    });
    const place = columns.length + at(cell, i);
    sum.right[place] = at(sum.right, place) + e;
    sum.left[place] = at(sum.left, place) + apart;
  }
  return sums;
}
