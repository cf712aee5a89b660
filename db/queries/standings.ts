import type { RuleKind } from "@/lib/domain/scoring/rules";
import type { Handle } from "../client/connect";

export interface StandingRow {
  entryId: string;
  score: number | null;
  uScore: number | null;
  rank: number | null;
  rankLow: number | null;
  rankHigh: number | null;
  pFirst: number | null;
  letters: string | null;
  whyNotRanked: string | null;
}

export interface StandingHead {
  seasonId: string;
  roundId: string | null;
  ruleVersionId: string;
  asOf: Date;
  draws: number;
  seed: number;
  methodVersion: number;
}

/** Adds a standing with the next number of its season, round and rule. @returns its id and number */
export async function insertStanding(
  db: Handle,
  { head, rows }: { head: StandingHead; rows: readonly StandingRow[] },
): Promise<{ id: string; number: number }> {
  const of = { season_id: head.seasonId, round_id: head.roundId, rule_version_id: head.ruleVersionId };
  const last = await db("standing").where(of).max<{ max: number | null }>("number as max").first();
  const number = (last?.max ?? 0) + 1;
  const [made]: { id: string }[] = await db("standing")
    .insert({ ...of, number, as_of: head.asOf, draws: head.draws, seed: head.seed, method_version: head.methodVersion })
    .returning("id");
  if (!made) throw new Error("no standing came back");
  const written = rows.map((row) => ({
    standing_id: made.id,
    entry_id: row.entryId,
    score: row.score,
    u_score: row.uScore,
    rank: row.rank,
    rank_low: row.rankLow,
    rank_high: row.rankHigh,
    p_first: row.pFirst,
    letters: row.letters,
    why_not_ranked: row.whyNotRanked,
  }));
  if (written.length > 0) await db.batchInsert("standing_row", written, 500);
  return { id: made.id, number };
}

export interface RuleVersion {
  id: string;
  kind: RuleKind;
  parameters: { m?: number };
}

/** The newest version of the naive rule that every standing is set beside; undefined where the host keeps none. */
export async function newestRuleVersion(db: Handle, { kind }: { kind: RuleKind }): Promise<RuleVersion | undefined> {
  return db("scoring_rule_version").where({ kind }).orderBy("created_at", "desc").first("id", "kind", "parameters");
}
