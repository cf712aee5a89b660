import { at } from "@/lib/science/statistics/descriptive";
import { createRandom } from "@/lib/science/statistics/random";

/** The regression whose effect is tried: its columns less their cell means, and how rows fall into cells and clusters. */
export interface BootstrapInput {
  readonly columns: readonly ArrayLike<number>[];
  /** What the whole fit leaves of y, and its slopes. */
  readonly residuals: ArrayLike<number>;
  readonly coefficients: ArrayLike<number>;
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
 * over clusters alone, and how one cluster's sums move another's score is one matrix for all draws: a draw costs
 * clusters², not rows or cells. Gives the same t* as refitting each draw.
 * @returns p, and the 95 % quantile of |t*|, by which estimate ± quantile · error is the interval that agrees with p
 */
export function wildBootstrap(
  input: BootstrapInput,
  effect: number,
  seed: number,
): { p: number; quantile: number; draws: number } {
  const { clusters } = input;
  const sums = clusterSums(input, effect);
  const moves = movesOf(input, sums);
  const random = createRandom(seed);
  const all = clusters <= ENUMERATE_UP_TO;
  const draws = all ? 2 ** clusters : DRAWS;
  const observed = Math.abs(input.t[effect] ?? Number.NaN);
  const reachedT = new Float64Array(draws);
  const signs = new Float64Array(clusters);
  for (let draw = 0; draw < draws; draw++) {
    for (let g = 0; g < clusters; g++) signs[g] = (all ? (draw >> g) & 1 : random.word() >>> 31) ? -1 : 1;
    let [slope, spread] = [0, 0];
    for (let g = 0; g < clusters; g++) {
      const own = at(signs, g) * (sums[g]?.own ?? 0);
      slope += own;
      let score = own;
      const row = moves[g] ?? signs;
      for (let h = 0; h < clusters; h++) score -= at(row, h) * at(signs, h);
      spread += score * score;
    }
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
function smallSampleFactor({ residuals, columns, cells, clusters }: BootstrapInput): number {
  return (clusters / (clusters - 1)) * ((residuals.length - 1) / (residuals.length - columns.length - cells));
}

interface ClusterSum {
  own: number;
  readonly right: Float64Array;
  readonly left: Float64Array;
}

/**
 * Row g, column h: what cluster h's sums, its sign up, take from cluster g's score: left_g times the fit (columns by
 * (XᵀX)⁻¹, cells by their counts) of right_h.
 */
function movesOf({ columns, cell, cells, inverse }: BootstrapInput, sums: readonly ClusterSum[]): Float64Array[] {
  const width = columns.length;
  const counts = new Float64Array(cells);
  for (const c of cell) counts[c] = at(counts, c) + 1;
  const moves = sums.map(() => new Float64Array(sums.length));
  sums.forEach(({ right }, h) => {
    const fitted = new Float64Array(width + cells);
    for (let k = 0; k < width; k++)
      for (let j = 0; j < width; j++) fitted[k] = at(fitted, k) + at(inverse[k] ?? right, j) * at(right, j);
    for (let c = 0; c < cells; c++) fitted[width + c] = at(right, width + c) / at(counts, c);
    sums.forEach(({ left }, g) => {
      let moved = 0;
      for (let k = 0; k < fitted.length; k++) moved += at(fitted, k) * at(left, k);
      const row = moves[g];
      if (row) row[h] = moved;
    });
  });
  return moves;
}

/**
 * Sums of one cluster: `own`, Σ x̃·e of the effect's column x̃ less what the others say of it; `right`, Σ of every
 * column (cells as dummies) times e; `left`, Σ of x̃ times every column.
 */
function clusterSums(input: BootstrapInput, effect: number): ClusterSum[] {
  const { columns, residuals, coefficients, cell, cells, cluster, clusters, inverse } = input;
  const row = inverse[effect] ?? new Float64Array(columns.length);
  const sums = Array.from({ length: clusters }, () => ({
    own: 0,
    right: new Float64Array(columns.length + cells),
    left: new Float64Array(columns.length + cells),
  }));
  // Without the effect the residuals are e + b·x̃ (Frisch and Waugh 1933); (XᵀX)⁻¹'s row times x is x̃ times its diagonal.
  const imposed = at(coefficients, effect) / at(row, effect);
  for (let i = 0; i < residuals.length; i++) {
    const sum = sums[at(cluster, i)];
    if (!sum) continue;
    let apart = 0;
    for (let k = 0; k < columns.length; k++) apart += at(row, k) * at(columns[k] ?? row, i);
    const e = at(residuals, i) + imposed * apart;
    sum.own += apart * e;
    for (let k = 0; k < columns.length; k++) {
      const value = at(columns[k] ?? row, i);
      sum.right[k] = at(sum.right, k) + value * e;
      sum.left[k] = at(sum.left, k) + value * apart;
    }
    const place = columns.length + at(cell, i);
    sum.right[place] = at(sum.right, place) + e;
    sum.left[place] = at(sum.left, place) + apart;
  }
  return sums;
}
