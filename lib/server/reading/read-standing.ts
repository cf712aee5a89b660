import { publicDb } from "@/db/client/handles";
import { shownStandingRows, shownStandings, type ShownStandingRow } from "@/db/queries/shown/seasons";
import type { Rule, Standing, StandingRow } from "@/lib/contracts/seasons";
import { ExpectedError } from "@/lib/domain/expected-error";
import { rankChanges } from "@/lib/domain/scoring/rank-changes";
import { RULES, type RuleKind } from "@/lib/domain/scoring/rules";

/** Letters that are longer tell nobody anything. */
const lettersMost = 12;
const moversShown = 8;

const ruleOf = (kind: RuleKind): Rule => ({ kind, ...RULES[kind] });

export interface StandingAsked {
  seasonId: string;
  /** Null: the season's standing. */
  roundId: string | null;
  seasonRuleVersionId: string;
  /** Another rule than the season's. */
  rule?: RuleKind;
}

/**
 * The newest standing of a round or a season under the season's rule or the one asked for, with what the plain sum
 * would change. Null before anything is published.
 *
 * @throws ExpectedError not_found for a rule that has no standing here
 */
export async function readStanding(asked: StandingAsked): Promise<Standing | null> {
  const db = publicDb();
  const standings = await shownStandings(db, asked);
  const bySeason = standings.find((each) => each.ruleVersionId === asked.seasonRuleVersionId);
  if (!bySeason) return null;
  const chosen = asked.rule ? standings.find((each) => each.ruleKind === asked.rule) : bySeason;
  if (!chosen) throw new ExpectedError("not_found", "There is no standing under that rule here.");
  const plain = standings.find((each) => each.ruleKind === "plain-sum");
  const rowsOf = async (id: string) => shownStandingRows(db, { standingId: id });
  const ruled = await rowsOf(bySeason.id);
  const [shown, summed] = await Promise.all([
    chosen.id === bySeason.id ? ruled : rowsOf(chosen.id),
    plain ? (plain.id === bySeason.id ? ruled : rowsOf(plain.id)) : undefined,
  ]);
  const lettersShort = shown.every((row) => (row.letters?.length ?? 0) <= lettersMost);
  const ruleRanks = new Map(ruled.map((row) => [row.entryId, row.rank]));
  return {
    number: chosen.number,
    asOf: chosen.asOf.toISOString(),
    draws: chosen.draws,
    seed: chosen.seed,
    rule: ruleOf(chosen.ruleKind),
    seasonRule: bySeason.ruleKind,
    rows: shown.map((row): StandingRow => ({
      entryId: row.entryId,
      slug: row.slug,
      name: row.name,
      letter: row.letter,
      designers: row.designers ?? [],
      round: row.roundNumber,
      score: row.score,
      uScore: row.uScore,
      rank: row.rank,
      rankLow: row.rankLow,
      rankHigh: row.rankHigh,
      pFirst: row.pFirst,
      letters: lettersShort ? row.letters : null,
      whyNotRanked: row.whyNotRanked,
      equalNoiseK: row.equalNoiseK,
      rankByRule: chosen.id === bySeason.id ? null : (ruleRanks.get(row.entryId) ?? null),
    })),
    plainSum: summed && plain?.id !== bySeason.id ? plainSumOf(ruled, summed) : null,
    rules: standings
      .map(({ ruleKind }) => ({ kind: ruleKind, label: RULES[ruleKind].label }))
      .sort((a) => (a.kind === bySeason.ruleKind ? -1 : 1)),
  };
}

function plainSumOf(ruled: readonly ShownStandingRow[], summed: readonly ShownStandingRow[]): Standing["plainSum"] {
  const rank = ({ entryId, rank: place }: ShownStandingRow) => ({ id: entryId, rank: place });
  const changes = rankChanges(ruled.map(rank), summed.map(rank));
  const names = new Map(ruled.map((row) => [row.entryId, `${row.name} ${row.letter}`]));
  const nameOf = (id: string): string => names.get(id) ?? "a withdrawn entry";
  return {
    both: changes.both,
    moved: changes.moved,
    firstBefore: changes.firstBefore.map(nameOf),
    firstAfter: changes.firstAfter.map(nameOf),
    movers: changes.movers
      .slice(0, moversShown)
      .map(({ id, from, to }) => ({ entryId: id, name: nameOf(id), from, to })),
    onlyPlainSum: changes.onlyAfter.length,
  };
}
