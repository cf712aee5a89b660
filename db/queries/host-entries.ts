import type { EntryState } from "@/lib/domain/designs/entry-moves";
import type { Handle } from "../client/connect";

export interface HostEntryRow {
  entryId: string;
  revisionId: string;
  designName: string;
  designSlug: string;
  letter: string;
  owners: string[];
  seasonId: string;
  seasonNumber: number;
  state: EntryState;
  stateAt: Date;
  everPublished: boolean;
  reason: string | null;
  carriedFrom: string | null;
  roundId: string | null;
  roundNumber: number | null;
  stages: number;
  frameKey: string;
  material: string;
  licence: string;
}

export interface HostEntriesAsked {
  entryId?: string;
  roundId?: string;
  seasonId?: string;
  states?: readonly EntryState[];
  /** Only what comes after this entry, and so many at most. */
  after?: string;
  limit?: number;
}

/** Entries for the host, those that waited longest first; a round's, a season's, of one state, or one alone. */
export async function hostEntryRows(db: Handle, where: HostEntriesAsked): Promise<HostEntryRow[]> {
  const { rows }: { rows: HostEntryRow[] } = await db.raw(
    `with e as (
       select x.* from entry x
       where (:entryId::uuid is null or x.id = :entryId::uuid)
         and (:seasonId::uuid is null or x.season_id = :seasonId::uuid)
         and (:states::text[] is null or x.state = any (:states::text[]))
         and (:roundId::uuid is null or exists (select 1 from round_entry q
           where q.round_id = :roundId::uuid and q.entry_id = x.id and q.taken_out_at is null))
         and (:after::uuid is null or (x.state_at, x.id) > (select a.state_at, a.id from entry a where a.id = :after::uuid))
       order by x.state_at, x.id limit :limit)
     select e.id as "entryId", r.id as "revisionId", d.name as "designName", d.slug as "designSlug", r.letter,
       array(select coalesce(h.handle, 'former member') from design_owner o join person h on h.id = o.person_id
         where o.design_id = d.id and o.until_at is null order by o.from_at, o.id) as owners,
       s.id as "seasonId", s.number as "seasonNumber", e.state, e.state_at as "stateAt", e.ever_published as "everPublished",
       (select m.reason from entry_move m where m.entry_id = e.id order by m.at desc, m.id desc limit 1) as reason,
       e.carried_from as "carriedFrom", n.id as "roundId", n.number as "roundNumber",
       t.stages, f.key as "frameKey", t.material, r.licence
     from e join revision r on r.id = e.revision_id join design d on d.id = r.design_id join season s on s.id = e.season_id
       join revision_trait t on t.revision_id = r.id join frame f on f.id = t.frame_id
       left join lateral (
         select x.id, x.number from round_entry re join round x on x.id = re.round_id
         where re.entry_id = e.id and re.taken_out_at is null and x.state <> 'published' limit 1) n on true
     order by e.state_at, e.id`,
    {
      entryId: where.entryId ?? null,
      roundId: where.roundId ?? null,
      seasonId: where.seasonId ?? null,
      states: where.states ? [...where.states] : null,
      after: where.after ?? null,
      limit: where.limit ?? null,
    },
  );
  return rows;
}

export interface LockedEntry {
  entryId: string;
  revisionId: string;
  seasonId: string;
  state: EntryState;
  everPublished: boolean;
}

/** Holds an entry's row until the transaction ends. */
export async function lockEntry(db: Handle, { entryId }: { entryId: string }): Promise<LockedEntry | undefined> {
  return db("entry").where({ id: entryId }).forUpdate().first<LockedEntry | undefined>({
    entryId: "id",
    revisionId: "revision_id",
    seasonId: "season_id",
    state: "state",
    everPublished: "ever_published",
  });
}

/** Rounds before their hour that an entry stands in, by id. */
export async function roundsOfEntry(db: Handle, { entryId }: { entryId: string }): Promise<string[]> {
  const rows = await db("round_entry as re")
    .join("round as n", "n.id", "re.round_id")
    .where("re.entry_id", entryId)
    .whereNull("re.taken_out_at")
    .whereNot("n.state", "published")
    .orderBy("n.id")
    .select<{ id: string }[]>("n.id");
  return rows.map((row) => row.id);
}

/** Takes an entry out of a round. @returns whether it stood in it */
export async function takeOutRow(
  db: Handle,
  { roundId, entryId, reason, at }: { roundId: string; entryId: string; reason: string; at: Date },
): Promise<boolean> {
  const taken = await db("round_entry")
    .where({ round_id: roundId, entry_id: entryId })
    .whereNull("taken_out_at")
    .update({ taken_out_at: at, reason });
  return taken === 1;
}

/** Puts entries into a round; one that stood in it before gets its next attempt. */
export async function addToRound(
  db: Handle,
  { roundId, entryIds }: { roundId: string; entryIds: readonly string[] },
): Promise<void> {
  await db.raw(
    `insert into round_entry (round_id, entry_id, attempt)
     select :roundId, e.id, 1 + coalesce((select max(attempt) from round_entry x where x.round_id = :roundId and x.entry_id = e.id), 0)
     from unnest(:entryIds::uuid[]) as e(id)`,
    { roundId, entryIds: [...entryIds] },
  );
}

export async function insertEntry(
  db: Handle,
  entry: { revisionId: string; seasonId: string; carriedFrom?: string },
): Promise<string> {
  const [made]: { id: string }[] = await db("entry")
    .insert({
      revision_id: entry.revisionId,
      season_id: entry.seasonId,
      carried_from: entry.carriedFrom ?? null,
    })
    .returning("id");
  if (!made) throw new Error("no entry came back");
  return made.id;
}

/** Takes an entry out of what the world sees and leaves a stub with the reason. */
export async function withdrawPublished(
  db: Handle,
  { entryId, reason, byPerson, at }: { entryId: string; reason: string; byPerson: string; at: Date },
): Promise<void> {
  await db("withdrawal").insert({ entry_id: entryId, reason, by_person: byPerson, at });
  await db("published_entry").where({ entry_id: entryId }).delete();
}
