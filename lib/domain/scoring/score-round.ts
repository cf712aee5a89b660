import { roundResult } from "../results/rounding";
import { comparePairs, lettersOf, type PairComparison } from "./compare-entries";
import type { RoundInput } from "./round-input";
import { RULES } from "./rules";
import { scoreSessions, type PreparedSession, type Score, type ScoredEntry } from "./score-entry";
import { simulateRound, type RankSpread } from "./simulate-round";

export type RankedEntry = ScoredEntry & { readonly score: Score; readonly rank: number; readonly spread: RankSpread };

/** A scored round in full precision; `roundAnswer` writes it out. */
export type ScoredRound = {
  readonly sessions: readonly PreparedSession[];
  /** By entry id: rank, range and letters of the ranked ones. */
  readonly ranked: ReadonlyMap<string, RankedEntry>;
  readonly letters: ReadonlyMap<string, string>;
  readonly comparisons: readonly PairComparison[];
};

/**
 * Scores a round: points, equal-noise readings, scores, ranks with their 95 % ranges, comparisons and letters.
 *
 * Rank 1 is best; equal scores (to 1e-9) share a rank and the next is left out. An entry whose level is only a bound is
 * ranked as if the bound's correction hadn't been made, so that it can't win by less than that; its score stays the
 * corrected one.
 * @param input as `parseRound` gives it: nothing is checked again
 */
export function scoreRound(input: RoundInput): ScoredRound {
  const sessions = scoreSessions(input);
  const scored = sessions.flatMap(({ entries }) => entries).flatMap((e) => (e.score ? [{ ...e, score: e.score }] : []));
  const { better } = RULES[input.rule.kind];
  const guarded = scored.map(({ score }) =>
    roundResult((better === "lower" ? score.value : -score.value) + score.boundAllowance),
  );
  const spreads = simulateRound(input, sessions, scored);
  const ranked = scored.flatMap((entry, i): RankedEntry[] => {
    const own = guarded[i];
    const spread = spreads[i];
    if (own === undefined || spread === undefined) return [];
    return [{ ...entry, rank: 1 + guarded.filter((other) => other < own).length, spread }];
  });
  const comparisons = comparePairs(ranked, better);
  const idsByRank = [...ranked].sort((a, b) => a.rank - b.rank).map(({ id }) => id);
  return {
    sessions,
    ranked: new Map(ranked.map((entry) => [entry.id, entry])),
    letters: lettersOf(idsByRank, comparisons),
    comparisons,
  };
}
