import { ExpectedError } from "@/lib/domain/expected-error";
import type { RuleKind } from "@/lib/domain/scoring/rules";
import type { RoundState } from "@/lib/domain/seasons/round-moves";
import type { EntryState } from "@/lib/domain/designs/entry-moves";
import type { Handle } from "../client/connect";

export interface RoundEntryRow {
  entryId: string;
  state: EntryState;
  everPublished: boolean;
  revisionId: string;
  designId: string;
  ownerIds: string[];
  /** The newest session of this round with a run of the entry that is done; null when there is none. */
  sessionId: string | null;
}

/** A round with all that its review and publication need to know. */
export interface RoundContext {
  roundId: string;
  number: number;
  state: RoundState;
  publishAt: Date | null;
  seasonId: string;
  seasonNumber: number;
  levelsDba: number[];
  headlineDba: number;
  ruleVersionId: string;
  ruleKind: RuleKind;
  ruleParameters: { m?: number };
  entries: RoundEntryRow[];
}

/** @throws ExpectedError not_found. With `lock` the round's row is held until the transaction ends. */
export async function roundContext(
  db: Handle,
  { roundId, lock = false }: { roundId: string; lock?: boolean },
): Promise<RoundContext> {
  if (lock) await db("round").where({ id: roundId }).forUpdate().select("id");
  const row = await db("round as n")
    .join("season as s", "s.id", "n.season_id")
    .join("scoring_rule_version as v", "v.id", "s.scoring_rule_version_id")
    .where("n.id", roundId)
    .first<Omit<RoundContext, "entries"> | undefined>(
      "n.id as roundId",
      "n.number",
      "n.state",
      "n.publish_at as publishAt",
      "s.id as seasonId",
      "s.number as seasonNumber",
      "s.levels_dba as levelsDba",
      "s.headline_dba as headlineDba",
      "v.id as ruleVersionId",
      "v.kind as ruleKind",
      "v.parameters as ruleParameters",
    );
  if (!row) throw new ExpectedError("not_found", "There is no such round.");
  const { rows: entries }: { rows: RoundEntryRow[] } = await db.raw(
    `select e.id as "entryId", e.state, e.ever_published as "everPublished", r.id as "revisionId", r.design_id as "designId",
       array(select o.person_id from design_owner o where o.design_id = r.design_id and o.until_at is null order by o.person_id) as "ownerIds",
       (select s.id from session s join run u on u.session_id = s.id
         where s.round_id = re.round_id and u.entry_id = e.id and u.state = 'done' order by s.began_at desc, s.id desc limit 1) as "sessionId"
     from round_entry re join entry e on e.id = re.entry_id join revision r on r.id = e.revision_id
     where re.round_id = :roundId and re.taken_out_at is null order by e.id`,
    { roundId },
  );
  return { ...row, entries };
}

/** Ids of a round's sessions, oldest first. */
export async function sessionIdsOfRound(db: Handle, { roundId }: { roundId: string }): Promise<string[]> {
  const rows = await db("session")
    .where({ round_id: roundId })
    .orderBy(["began_at", "id"])
    .select<{ id: string }[]>("id");
  return rows.map((row) => row.id);
}

export interface SeasonEntrySession {
  entryId: string;
  sessionId: string;
  roundId: string;
}

/** Which session each entry that is public now in a season rests on. */
export async function publishedSessionsOfSeason(
  db: Handle,
  { seasonId }: { seasonId: string },
): Promise<SeasonEntrySession[]> {
  return db("published_entry as p")
    .join("publication_session as s", "s.publication_id", "p.publication_id")
    .where("p.season_id", seasonId)
    .orderBy(["s.session_id", "p.entry_id"])
    .select("p.entry_id as entryId", "s.session_id as sessionId", "p.round_id as roundId");
}
