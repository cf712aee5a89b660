/** Fewest values for each kind of statement, from the smallest p that can be reached at 5 % (derived). */
export const MINIMUM = { perGroup: 4, pairs: 6, correlation: 5, groupMean: 3 } as const;

/** Number of ways to choose k of n; 0 outside 0 ≤ k ≤ n. */
export function choose(n: number, k: number): number {
  if (k < 0 || k > n) return 0;
  let ways = 1;
  for (let i = 1; i <= Math.min(k, n - k); i++) ways = (ways * (n - i + 1)) / i;
  return Math.round(ways);
}

/** Smallest two-sided p that a permutation test of two groups of n each can reach: 2/C(2n, n). */
export function smallestPTwoGroups(perGroup: number): number {
  return 2 / choose(2 * perGroup, perGroup);
}

/** Smallest two-sided p that sign flips of n pairs can reach: 2/2^n. */
export function smallestPPairs(pairs: number): number {
  return 2 / 2 ** pairs;
}

/** Smallest two-sided p that Kendall's test on n points can reach: 2/n!. */
export function smallestPCorrelation(points: number): number {
  let factorial = 1;
  for (let i = 2; i <= points; i++) factorial *= i;
  return 2 / factorial;
}

/** What may be said of a comparison of groups: nothing but dots under the minimum counts. */
export function mayCompare(counts: readonly number[]): boolean {
  return counts.length > 1 && counts.every((count) => count >= MINIMUM.perGroup);
}
