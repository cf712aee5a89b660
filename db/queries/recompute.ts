import type { RuleKind } from "@/lib/domain/scoring/rules";
import type { Handle } from "../client/connect";
import type { StandingRow } from "./standings";
import { roundContext, type RoundContext } from "./round-context";

export interface StoredPublication {
  id: string;
  entryId: string;
  snapshot: unknown;
  sha256: string;
  /** Its session was made up by a demo's fill, and holds no readings. */
  filled: boolean;
  round: RoundContext;
}

/** A fill's mark holds only while nothing was ever measured in the session: it can't hide a reading. */
const filled = `exists (select 1 from filled_session f where f.session_id = s.session_id
           and not exists (select 1 from reading d where d.session_id = s.session_id))`;

/** Every publication that the world sees now, session by session, in pages by a stable key. */
export async function* currentPublications(db: Handle, pageSize = 200): AsyncGenerator<StoredPublication> {
  let after = { sessionId: "00000000-0000-0000-0000-000000000000", id: "00000000-0000-0000-0000-000000000000" };
  let round: RoundContext | undefined;
  for (;;) {
    const { rows }: { rows: (Omit<StoredPublication, "round"> & { sessionId: string; roundId: string })[] } =
      await db.raw(
        `select b.id, b.entry_id as "entryId", b.snapshot, b.sha256, b.round_id as "roundId", s.session_id as "sessionId",
         ${filled} as filled
       from published_entry p join publication b on b.id = p.publication_id join publication_session s on s.publication_id = b.id
       where (s.session_id, b.id) > (:sessionId, :id) order by s.session_id, b.id limit :pageSize`,
        { ...after, pageSize },
      );
    for (const { sessionId, roundId, ...row } of rows) {
      if (round?.roundId !== roundId) round = await roundContext(db, { roundId });
      yield { ...row, round };
      after = { sessionId, id: row.id };
    }
    if (rows.length < pageSize) return;
  }
}

export interface StoredStanding {
  id: string;
  number: number;
  seasonId: string;
  roundId: string | null;
  rule: { id: string; kind: RuleKind; parameters: { m?: number } };
  levelsDba: number[];
  headlineDba: number;
  asOf: Date;
  draws: number;
  seed: number;
}

/** The newest standing of every season, round and rule. */
export async function newestStandings(db: Handle): Promise<StoredStanding[]> {
  const { rows }: { rows: StoredStanding[] } = await db.raw(
    `select distinct on (t.season_id, t.round_id, t.rule_version_id) t.id, t.number, t.season_id as "seasonId", t.round_id as "roundId",
       jsonb_build_object('id', v.id, 'kind', v.kind, 'parameters', v.parameters) as rule, s.levels_dba as "levelsDba",
       s.headline_dba as "headlineDba", t.as_of as "asOf", t.draws, t.seed
     from standing t join scoring_rule_version v on v.id = t.rule_version_id join season s on s.id = t.season_id
     order by t.season_id, t.round_id, t.rule_version_id, t.number desc`,
  );
  return rows;
}

/** Whether a standing rests on filled sessions alone, so that there are no readings to draw it from again. */
export async function standingIsFilled(db: Handle, { standingId }: { standingId: string }): Promise<boolean> {
  const { rows }: { rows: { filled: boolean | null }[] } = await db.raw(
    `select bool_and(${filled}) as filled from standing_row r join published_entry p on p.entry_id = r.entry_id
       join publication_session s on s.publication_id = p.publication_id where r.standing_id = :standingId`,
    { standingId },
  );
  return rows[0]?.filled ?? false;
}

/** Which entries stand in a standing, each with the session that its publication rests on. */
export async function standingEntries(
  db: Handle,
  { standingId }: { standingId: string },
): Promise<{ entryId: string; sessionId: string }[]> {
  return db("standing_row as r")
    .join("published_entry as p", "p.entry_id", "r.entry_id")
    .join("publication_session as s", "s.publication_id", "p.publication_id")
    .where("r.standing_id", standingId)
    .orderBy(["s.session_id", "r.entry_id"])
    .select("r.entry_id as entryId", "s.session_id as sessionId");
}

/** A standing's rows as they were written, best first, in the order in which they are computed. */
export async function storedStandingRows(db: Handle, { standingId }: { standingId: string }): Promise<StandingRow[]> {
  return db("standing_row")
    .where({ standing_id: standingId })
    .orderByRaw("rank nulls last, entry_id")
    .select<StandingRow[]>({
      entryId: "entry_id",
      score: "score",
      uScore: "u_score",
      rank: "rank",
      rankLow: "rank_low",
      rankHigh: "rank_high",
      pFirst: "p_first",
      letters: "letters",
      whyNotRanked: "why_not_ranked",
    });
}
