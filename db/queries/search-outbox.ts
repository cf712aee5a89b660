import type { Handle } from "../client/connect";

export interface OutboxRow {
  id: number;
  entryId: string;
}

/** The oldest marks that wait, at most that many. */
export async function outboxRows(db: Handle, { limit }: { limit: number }): Promise<OutboxRow[]> {
  return db("search_outbox").orderBy("id").limit(limit).select({ id: "id", entryId: "entry_id" });
}

/** Deletes marks by their own ids: a mark that commits late, under a lower number, stays. */
export async function deleteOutboxRows(db: Handle, { ids }: { ids: readonly number[] }): Promise<void> {
  await db.raw("delete from search_outbox where id = any (?::bigint[])", [[...ids]]);
}

/** Marks entries, as the triggers do, so that they are sent as they are then. */
export async function markDirty(db: Handle, { entryIds }: { entryIds: readonly string[] }): Promise<void> {
  if (entryIds.length === 0) return;
  await db.raw("insert into search_outbox (entry_id) select unnest(?::uuid[])", [[...entryIds]]);
}

/** Which of some entries have marks that wait. */
export async function waitingAmong(db: Handle, { entryIds }: { entryIds: readonly string[] }): Promise<Set<string>> {
  const rows = await db("search_outbox")
    .whereIn("entry_id", [...entryIds])
    .distinct<{ entry_id: string }[]>("entry_id");
  return new Set(rows.map((row) => row.entry_id));
}

export interface SearchCounts {
  /** Entries that the world sees. */
  published: number;
  /** Entries with a mark that waits. */
  waiting: number;
  /** Entries that the service refused. */
  parked: number;
}

/** All three as of one moment. */
export async function searchCounts(db: Handle): Promise<SearchCounts> {
  const { rows }: { rows: SearchCounts[] } = await db.raw(
    `select (select count(*) from published_entry)::int as published,
       (select count(distinct entry_id) from search_outbox)::int as waiting,
       (select count(*) from search_dead_letter)::int as parked`,
  );
  const [row] = rows;
  if (!row) throw new Error("the database gave no counts");
  return row;
}

/** Sets an entry aside that the service refuses, with its reason; it is tried again when it is marked again. */
export async function parkEntry(db: Handle, { entryId, reason }: { entryId: string; reason: string }): Promise<void> {
  await db("search_dead_letter").insert({ entry_id: entryId, reason, at: db.fn.now() }).onConflict("entry_id").merge();
}

/** Entries that were sent are set aside no more. */
export async function unparkEntries(db: Handle, { entryIds }: { entryIds: readonly string[] }): Promise<void> {
  await db("search_dead_letter")
    .whereIn("entry_id", [...entryIds])
    .delete();
}
