import { at, mean, median } from "./descriptive";
import { normalCdf } from "./distributions";
import { midRanks } from "./rank-tests";

/**
 * Theil–Sen line: median of all slopes with different x, intercept the median of y − slope·x (P. K. Sen, J. Am. Stat.
 * Assoc. 63 (1968) 1379). Undefined when no two x differ.
 */
export function theilSen(x: ArrayLike<number>, y: ArrayLike<number>) {
  const slopes: number[] = [];
  for (let i = 0; i < x.length; i++)
    for (let j = i + 1; j < x.length; j++)
      if (at(x, i) !== at(x, j)) slopes.push((at(y, j) - at(y, i)) / (at(x, j) - at(x, i)));
  const slope = median(slopes);
  if (slope === undefined) return undefined;
  const intercept = median(Array.from(x, (value, i) => at(y, i) - slope * value)) ?? Number.NaN;
  return { slope, intercept, slopes: slopes.length };
}

function tieSums(values: ArrayLike<number>) {
  const counts = new Map<number, number>();
  for (let i = 0; i < values.length; i++) counts.set(at(values, i), (counts.get(at(values, i)) ?? 0) + 1);
  const over = (f: (t: number) => number) => [...counts.values()].reduce((total, t) => total + f(t), 0);
  return {
    pairs: over((t) => (t * (t - 1)) / 2),
    v: over((t) => t * (t - 1) * (2 * t + 5)),
    c: over((t) => t * (t - 1) * (t - 2)),
  };
}

/** Ways to order n values with k pairs against the order, as shares, k = 0 … n(n − 1)/2. */
function inversionShares(n: number): Float64Array {
  let shares = Float64Array.of(1);
  for (let size = 2; size <= n; size++) {
    const next = new Float64Array(shares.length + size - 1);
    shares.forEach((share, k) => {
      for (let j = 0; j < size; j++) next[k + j] = at(next, k + j) + share / size;
    });
    shares = next;
  }
  return shares;
}

/**
 * Kendall's τ-b (Biometrika 33 (1945) 239) with counts of pairs; two-sided p exact without ties up to 50 values, else
 * normal with the ties' variance. Undefined for fewer than two values or when x or y never differ.
 */
export function kendall(x: ArrayLike<number>, y: ArrayLike<number>) {
  const n = x.length;
  let [concordant, discordant, tiesXOnly, tiesYOnly] = [0, 0, 0, 0];
  for (let i = 0; i < n; i++)
    for (let j = i + 1; j < n; j++) {
      const [dx, dy] = [Math.sign(at(x, j) - at(x, i)), Math.sign(at(y, j) - at(y, i))];
      if (dx * dy > 0) concordant++;
      else if (dx * dy < 0) discordant++;
      else if (dx === 0 && dy !== 0) tiesXOnly++;
      else if (dy === 0 && dx !== 0) tiesYOnly++;
    }
  const known = concordant + discordant;
  const scale = Math.sqrt((known + tiesXOnly) * (known + tiesYOnly));
  if (!(scale > 0)) return undefined;
  const [tx, ty] = [tieSums(x), tieSums(y)];
  const exact = tx.pairs === 0 && ty.pairs === 0 && n <= 50;
  let p: number;
  if (exact) {
    const shares = inversionShares(n);
    const tail = shares.subarray(0, Math.min(concordant, discordant) + 1).reduce((total, share) => total + share, 0);
    p = Math.min(1, 2 * tail);
  } else {
    const base = n * (n - 1);
    const variance =
      (base * (2 * n + 5) - tx.v - ty.v) / 18 + (2 * tx.pairs * ty.pairs) / base + (tx.c * ty.c) / (9 * base * (n - 2));
    p = 2 * normalCdf(-Math.abs(concordant - discordant) / Math.sqrt(variance));
  }
  return { concordant, discordant, tiesXOnly, tiesYOnly, tau: (concordant - discordant) / scale, p, exact };
}

/** Spearman's ρ: Pearson's correlation of the mid-ranks. Undefined when x or y never differ. */
export function spearman(x: ArrayLike<number>, y: ArrayLike<number>): number | undefined {
  const [a, b] = [midRanks(x), midRanks(y)];
  const [ma, mb] = [mean(a) ?? 0, mean(b) ?? 0];
  const products = (p: Float64Array, mp: number, q: Float64Array, mq: number) =>
    p.reduce((total, v, i) => total + (v - mp) * (at(q, i) - mq), 0);
  const scale = Math.sqrt(products(a, ma, a, ma) * products(b, mb, b, mb));
  return scale > 0 ? products(a, ma, b, mb) / scale : undefined;
}

/** Two-sided exact p of ρ by all orders, for up to nine values (362,880 orders); undefined above or without ρ. */
export function spearmanExactP(x: ArrayLike<number>, y: ArrayLike<number>): number | undefined {
  const n = x.length;
  const rho = spearman(x, y);
  if (rho === undefined || n > 9) return undefined;
  const [a, b] = [midRanks(x), midRanks(y)];
  const target = a.reduce((total, rank, i) => total + rank * at(b, i), 0);
  // Twice the smaller tail, as the distribution of Σ R·S may be skew with ties.
  let [low, high, all] = [0, 0, 0];
  const walk = (i: number, used: number, total: number) => {
    if (i === n) {
      all++;
      if (total <= target + 1e-9) low++;
      if (total >= target - 1e-9) high++;
      return;
    }
    for (let j = 0; j < n; j++) if (!(used & (1 << j))) walk(i + 1, used | (1 << j), total + at(a, i) * at(b, j));
  };
  walk(0, 0, 0);
  return Math.min(1, (2 * Math.min(low, high)) / all);
}
