import { ascending, at, median, sortedQuantile } from "./descriptive";
import { chiSquareUpper } from "./chi-square-and-f";
import { normalCdf, normalQuantile } from "./distributions";

/** Ranks from 1, equal values sharing their mean rank. */
export function midRanks(values: ArrayLike<number>): Float64Array {
  const order = Array.from({ length: values.length }, (_, i) => i).sort((a, b) => at(values, a) - at(values, b));
  const ranks = new Float64Array(values.length);
  for (let from = 0; from < order.length;) {
    let to = from;
    while (to < order.length && at(values, at(order, to)) === at(values, at(order, from))) to++;
    for (let i = from; i < to; i++) ranks[at(order, i)] = (from + to + 1) / 2;
    from = to;
  }
  return ranks;
}

function tieSum(values: ArrayLike<number>): number {
  const counts = new Map<number, number>();
  for (let i = 0; i < values.length; i++) counts.set(at(values, i), (counts.get(at(values, i)) ?? 0) + 1);
  return [...counts.values()].reduce((total, t) => total + t ** 3 - t, 0);
}

/** Numbers of ways in which U of two groups of m and n takes each value 0..mn, as shares of all (no ties). */
function uShares(m: number, n: number): Float64Array {
  let counts = Float64Array.of(1);
  // Generating function Π (1 − q^(n+i))/(1 − q^i), i = 1..m, kept as shares so that nothing overflows.
  for (let i = 1; i <= m; i++) {
    const next = new Float64Array(i * n + 1);
    const raised = new Float64Array(i * n + 1);
    counts.forEach((c, k) => (raised[k] = c));
    for (let k = i * n; k >= n + i; k--) raised[k] = at(raised, k) - at(raised, k - n - i);
    for (let k = 0; k <= i * n; k++) next[k] = at(raised, k) + (k >= i ? at(next, k - i) : 0);
    counts = next.map((c) => (c * i) / (n + i));
  }
  return counts;
}

/**
 * Mann and Whitney's U (Ann. Math. Stat. 18 (1947) 50): pairs with x above y, equal ones half. Two-sided p exact (twice
 * the smaller tail) up to 50 a group without ties, else normal with ties and continuity. Undefined for an empty group.
 */
export function mannWhitney(
  x: ArrayLike<number>,
  y: ArrayLike<number>,
): { u: number; p: number; exact: boolean } | undefined {
  const [m, n] = [x.length, y.length];
  if (m === 0 || n === 0) return undefined;
  const all = [...Array.from(x), ...Array.from(y)];
  const ranks = midRanks(all);
  const u = ranks.subarray(0, m).reduce((total, rank) => total + rank, 0) - (m * (m + 1)) / 2;
  const ties = tieSum(all);
  if (ties === 0 && m < 50 && n < 50) {
    const shares = uShares(m, n);
    const tail = shares.subarray(0, Math.min(u, m * n - u) + 1).reduce((total, share) => total + share, 0);
    return { u, p: Math.min(1, 2 * tail), exact: true };
  }
  const total = m + n;
  const sd = Math.sqrt(((m * n) / 12) * (total + 1 - ties / (total * (total - 1))));
  const z = Math.max(0, Math.abs(u - (m * n) / 2) - 0.5) / sd;
  return { u, p: sd > 0 ? Math.min(1, 2 * normalCdf(-z)) : 1, exact: false };
}

/**
 * Kruskal and Wallis's H over groups with ties corrected, p from chi-square (J. Am. Stat. Assoc. 47 (1952) 583). Undefined
 * for fewer than two groups with values or when all are equal.
 */
export function kruskalWallis(groups: readonly ArrayLike<number>[]): { h: number; dof: number; p: number } | undefined {
  const filled = groups.filter((group) => group.length > 0);
  const all = filled.flatMap((group) => Array.from(group));
  const n = all.length;
  const ties = 1 - tieSum(all) / (n ** 3 - n);
  if (filled.length < 2 || !(ties > 0)) return undefined;
  const ranks = midRanks(all);
  let from = 0;
  let squares = 0;
  for (const group of filled) {
    const total = ranks.subarray(from, from + group.length).reduce((sum, rank) => sum + rank, 0);
    squares += (total * total) / group.length;
    from += group.length;
  }
  const h = ((12 / (n * (n + 1))) * squares - 3 * (n + 1)) / ties;
  return { h, dof: filled.length - 1, p: chiSquareUpper(Math.max(0, h), filled.length - 1) };
}

/**
 * Hodges and Lehmann's shift of x over y: median of all differences, with the 95 % interval of the rank test (exact
 * shares without ties under 50 a group, else normal). The interval is undefined where the counts can't reach 95 %.
 */
export function hodgesLehmann(x: ArrayLike<number>, y: ArrayLike<number>) {
  const differences = ascending(Array.from(x).flatMap((a) => Array.from(y, (b) => a - b)));
  const shift = median(differences);
  if (shift === undefined) return undefined;
  const [m, n] = [x.length, y.length];
  const exact = tieSum([...Array.from(x), ...Array.from(y)]) === 0 && m < 50 && n < 50;
  const normal = Math.round((m * n) / 2 + normalQuantile(0.025) * Math.sqrt((m * n * (m + n + 1)) / 12));
  const k = exact ? countBelow(uShares(m, n), 0.025) : normal;
  return { shift, interval: intervalAt(differences, k) };
}

/**
 * Median with its 95 % interval of order statistics (sign test, binomial; W. J. Conover, Practical Nonparametric
 * Statistics, 3.2; citation from memory). The interval needs six values; undefined below. Undefined for none.
 */
export function medianInterval(values: ArrayLike<number>) {
  return sortedMedianInterval(ascending(values));
}

/** The same of values that are in ascending order already. */
export function sortedMedianInterval(sorted: Float64Array) {
  const centre = sortedQuantile(sorted, 0.5);
  if (centre === undefined) return undefined;
  const n = sorted.length;
  let [logShare, below, k] = [-n * Math.LN2, 0, 0];
  for (; k <= n; k++) {
    below += Math.exp(logShare);
    if (below > 0.025) break;
    logShare += Math.log((n - k) / (k + 1));
  }
  return { median: centre, interval: intervalAt(sorted, k) };
}

/** How many of the smallest outcomes together stay within the tail. */
function countBelow(shares: Float64Array, tail: number): number {
  let total = 0;
  let k = 0;
  while (k < shares.length && (total += at(shares, k)) <= tail) k++;
  return k;
}

function intervalAt(sorted: Float64Array, k: number): { low: number; high: number } | undefined {
  return k < 1 || 2 * k > sorted.length ? undefined : { low: at(sorted, k - 1), high: at(sorted, sorted.length - k) };
}
