import type { RoundState } from "@/lib/domain/seasons/round-moves";
import type { Handle } from "../client/connect";

export interface ReviewListRow {
  roundId: string;
  seasonNumber: number;
  number: number;
  title: string;
  state: RoundState;
  publishAt: Date | null;
  entries: number;
  lent: boolean;
  ownedInRound: boolean;
}

/** Rounds before their hour, those in review first; of a member only those that were lent to them. */
export async function roundsBeforeTheHour(
  db: Handle,
  { personId, lentOnly }: { personId: string; lentOnly: boolean },
): Promise<ReviewListRow[]> {
  const { rows }: { rows: ReviewListRow[] } = await db.raw(
    `select n.id as "roundId", s.number as "seasonNumber", n.number, n.title, n.state, n.publish_at as "publishAt",
       (select count(*)::int from round_entry x where x.round_id = n.id and x.taken_out_at is null) as entries,
       l.person_id is not null as lent,
       exists (select 1 from round_entry re join entry e on e.id = re.entry_id join revision r on r.id = e.revision_id
         join design_owner o on o.design_id = r.design_id
         where re.round_id = n.id and o.person_id = :personId
           and (o.until_at is null or o.until_at >= re.added_at)) as "ownedInRound"
     from round n join season s on s.id = n.season_id
       left join review_loan l on l.round_id = n.id and l.person_id = :personId
     where n.state in ('measuring', 'in_review', 'signed', 'scheduled') and (not :lentOnly or l.person_id is not null)
     order by n.state <> 'in_review', s.number, n.number`,
    { personId, lentOnly },
  );
  return rows;
}

/** Names of a round's entries, by entry. */
export async function entryNames(
  db: Handle,
  { entryIds }: { entryIds: readonly string[] },
): Promise<Map<string, { designName: string; letter: string }>> {
  const rows = await db("entry as e")
    .join("revision as r", "r.id", "e.revision_id")
    .join("design as d", "d.id", "r.design_id")
    .whereIn("e.id", [...entryIds])
    .select<{ id: string; designName: string; letter: string }[]>("e.id", "d.name as designName", "r.letter");
  return new Map(rows.map(({ id, ...name }) => [id, name]));
}

export interface PastReview {
  id: string;
  at: Date;
  reviewerId: string;
  verdict: "signed" | "sent_back";
  note: string;
  entries: { entryId: string; reason: string }[];
}

/** Reviews of a round, the newest first, each with the entries that it sent back. */
export async function reviewsOfRound(db: Handle, { roundId }: { roundId: string }): Promise<PastReview[]> {
  const { rows }: { rows: PastReview[] } = await db.raw(
    `select v.id, v.at, v.reviewer_id as "reviewerId", v.verdict, v.note,
       coalesce((select jsonb_agg(jsonb_build_object('entryId', x.entry_id, 'reason', x.reason) order by x.entry_id)
         from review_entry x where x.review_id = v.id), '[]') as entries
     from review v where v.round_id = :roundId order by v.at desc, v.id desc`,
    { roundId },
  );
  return rows;
}

export interface ChangeRow {
  at: Date;
  entryId: string | null;
  kind: "superseded" | "readings" | "taken_out" | "added";
  quantity: string | null;
  setSpeed: number | null;
  was: number | null;
  value: number | null;
  unit: string | null;
  reason: string | null;
  count: number | null;
}

/** What changed in a round after a moment, in order: readings superseded, runs added, entries added or taken out. */
export async function changesSince(db: Handle, params: { roundId: string; since: Date }): Promise<ChangeRow[]> {
  const { rows }: { rows: ChangeRow[] } = await db.raw(
    `select d.taken_at as at, u.entry_id as "entryId", 'superseded' as kind, d.quantity, u.set_speed as "setSpeed",
       o.value as was, d.value, d.unit, d.reason, null::int as count
     from reading d join reading o on o.id = d.supersedes join session s on s.id = d.session_id left join run u on u.id = d.run_id
     where s.round_id = :roundId and d.taken_at > :since
     union all
     select max(d.taken_at), u.entry_id, 'readings', null, null, null, null, null, null, count(*)::int
     from reading d join session s on s.id = d.session_id left join run u on u.id = d.run_id
     where s.round_id = :roundId and d.taken_at > :since and d.supersedes is null group by u.entry_id
     union all
     select taken_out_at, entry_id, 'taken_out', null, null, null, null, null, reason, null
     from round_entry where round_id = :roundId and taken_out_at > :since
     union all
     select added_at, entry_id, 'added', null, null, null, null, null, null, null
     from round_entry where round_id = :roundId and added_at > :since
     order by at`,
    params,
  );
  return rows;
}

export interface ReviewSessionRow {
  sessionId: string;
  number: number;
  operatorId: string;
  beganAt: Date;
  endedAt: Date | null;
}

/** Sessions of a round, the oldest first. */
export async function sessionsOfRound(db: Handle, { roundId }: { roundId: string }): Promise<ReviewSessionRow[]> {
  return db("session").where({ round_id: roundId }).orderBy(["began_at", "id"]).select({
    sessionId: "id",
    number: "number",
    operatorId: "operator_id",
    beganAt: "began_at",
    endedAt: "ended_at",
  });
}
