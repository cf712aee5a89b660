/** A rank and the highest one possible: the higher the better. */
export type Rank = readonly [rank: number, max: number];

/** One figure, above 0 and up to 1, for ranks of which each only orders what those before it leave tied. */
export function globalScore(ranks: readonly Rank[]): number {
  let rank = 1;
  let max = 1;
  for (const [inner, innerMax] of ranks) {
    rank = Math.max(0, rank - 1) * innerMax + inner;
    max *= innerMax;
  }
  return rank / max;
}

/** Highest positions that still cost 0, 1, 2 …; what stands later costs 10. */
const LAST_POSITIONS = [0, 1, 4, 7, 11, 16, 24, 64, 256, 1024];

/** What a word's place in a text costs, counted from 0. */
export function positionCost(position: number): number {
  const bucket = bucketOf(position);
  const cost = LAST_POSITIONS.findIndex((last) => bucket <= last);
  return cost < 0 ? LAST_POSITIONS.length : cost;
}

/** The service keeps places exactly up to 15, then as 24, then as the next power of two. */
function bucketOf(position: number): number {
  if (position < 16) return position;
  return position < 24 ? 24 : 2 ** Math.ceil(Math.log2(position));
}
