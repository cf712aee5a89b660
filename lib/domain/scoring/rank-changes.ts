/** What another rule makes of the same entries. */
export type RankChanges = {
  /** Entries that both rules rank. */
  readonly both: number;
  /** Of these, how many stand elsewhere. */
  readonly moved: number;
  readonly firstBefore: readonly string[];
  readonly firstAfter: readonly string[];
  /** Those that moved, the furthest first; equal moves in the order of the rank before. */
  readonly movers: readonly { readonly id: string; readonly from: number; readonly to: number }[];
  /** Ranked by one of the rules alone. */
  readonly onlyBefore: readonly string[];
  readonly onlyAfter: readonly string[];
};

type Ranked = { readonly id: string; readonly rank: number | null };

/**
 * Two rankings of one set of entries set against each other. Ranks are among those that both rules rank, counted anew
 * from 1 (ties share the lower number), so that nobody moves only because somebody else isn't ranked.
 *
 * @param before ranks under the rule that holds; null for not ranked
 * @param after the same entries under the other rule
 */
export function rankChanges(before: readonly Ranked[], after: readonly Ranked[]): RankChanges {
  const [ranksBefore, ranksAfter] = [known(before), known(after)];
  const shared = [...ranksBefore.keys()].filter((id) => ranksAfter.has(id));
  const [from, to] = [again(shared, ranksBefore), again(shared, ranksAfter)];
  const movers = shared
    .map((id) => ({ id, from: from.get(id) ?? 0, to: to.get(id) ?? 0 }))
    .filter((each) => each.from !== each.to)
    .sort((a, b) => Math.abs(b.to - b.from) - Math.abs(a.to - a.from) || a.from - b.from || (a.id < b.id ? -1 : 1));
  const first = (ranks: ReadonlyMap<string, number>) => shared.filter((id) => ranks.get(id) === 1);
  return {
    both: shared.length,
    moved: movers.length,
    firstBefore: first(from),
    firstAfter: first(to),
    movers,
    onlyBefore: [...ranksBefore.keys()].filter((id) => !ranksAfter.has(id)),
    onlyAfter: [...ranksAfter.keys()].filter((id) => !ranksBefore.has(id)),
  };
}

function known(ranked: readonly Ranked[]): Map<string, number> {
  return new Map(ranked.flatMap(({ id, rank }) => (rank === null ? [] : [[id, rank] as const])));
}

/** Ranks among the given ids alone: one more than the number of those before. */
function again(ids: readonly string[], ranks: ReadonlyMap<string, number>): Map<string, number> {
  const rankOf = (id: string): number => ranks.get(id) ?? Infinity;
  const sorted = ids.map(rankOf).sort((a, b) => a - b);
  const place = new Map<number, number>();
  sorted.forEach((rank, i) => {
    if (!place.has(rank)) place.set(rank, i + 1);
  });
  return new Map(ids.map((id) => [id, place.get(rankOf(id)) ?? 0]));
}
