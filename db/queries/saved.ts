import type { Handle } from "../client/connect";

export interface SavedComparisonRow {
  id: string;
  name: string;
  note: string;
  address: string;
  shareKey: string | null;
  createdAt: Date;
  updatedAt: Date;
}

const comparison = {
  id: "id",
  name: "name",
  note: "note",
  address: "address",
  shareKey: "share_key",
  createdAt: "created_at",
  updatedAt: "updated_at",
} as const;
const search = { id: "id", name: "name", address: "address", createdAt: "created_at" } as const;

type Owned = { personId: string; id: string };

/** A person's own saved comparisons, the newest first. */
export async function comparisonRows(db: Handle, { personId }: { personId: string }): Promise<SavedComparisonRow[]> {
  return db("saved_comparison")
    .where({ person_id: personId })
    .orderBy(["created_at", "id"].map((column) => ({ column, order: "desc" })))
    .select(comparison);
}

/** One of a person's own; undefined for another's as for none. Its row is held where a transaction asks. */
export async function comparisonRow(db: Handle, { personId, id }: Owned): Promise<SavedComparisonRow | undefined> {
  const query = db("saved_comparison").where({ person_id: personId, id });
  if (db.isTransaction) void query.forUpdate();
  return query.first<SavedComparisonRow | undefined>(comparison);
}

export interface ComparisonValues {
  name: string;
  note: string;
  shareKey: string | null;
}

export async function insertComparison(
  db: Handle,
  row: ComparisonValues & { personId: string; address: string },
): Promise<SavedComparisonRow> {
  const { personId, name, note, address, shareKey } = row;
  const [made]: SavedComparisonRow[] = await db("saved_comparison")
    .insert({
      ...{ person_id: personId, name, note, address, share_key: shareKey },
      shared_at: shareKey === null ? null : db.fn.now(),
    })
    .returning(Object.entries(comparison).map(([as, column]) => db.ref(column).as(as)));
  if (!made) throw new Error("no saved comparison came back");
  return made;
}

/** Writes name, note and key; the time of sharing stays while the key does. */
export async function updateComparison(db: Handle, row: ComparisonValues & Owned): Promise<void> {
  const { personId, id, name, note, shareKey } = row;
  await db("saved_comparison")
    .where({ person_id: personId, id })
    .update({
      ...{ name, note, share_key: shareKey, updated_at: db.fn.now() },
      shared_at: db.raw("case when ?::text is null then null else coalesce(shared_at, now()) end", [shareKey]),
    });
}

/** @returns whether there was one of this person's */
export async function deleteSaved(
  db: Handle,
  { table, personId, id }: Owned & { table: "saved_comparison" | "saved_search" },
): Promise<boolean> {
  return (await db(table).where({ person_id: personId, id }).delete()) > 0;
}

export async function countSaved(
  db: Handle,
  { table, personId }: { table: "saved_comparison" | "saved_search"; personId: string },
): Promise<number> {
  const row = await db(table).where({ person_id: personId }).count<{ count: number | string }[]>("* as count");
  return Number(row[0]?.count ?? 0);
}

export interface SavedSearchRow {
  id: string;
  name: string;
  address: string;
  createdAt: Date;
}

/** A person's own saved searches, the newest first. */
export async function searchRows(db: Handle, { personId }: { personId: string }): Promise<SavedSearchRow[]> {
  return db("saved_search")
    .where({ person_id: personId })
    .orderBy(["created_at", "id"].map((column) => ({ column, order: "desc" })))
    .select(search);
}

export async function insertSearch(
  db: Handle,
  { personId, name, address }: { personId: string; name: string; address: string },
): Promise<SavedSearchRow> {
  const [made]: SavedSearchRow[] = await db("saved_search")
    .insert({ person_id: personId, name, address })
    .returning(Object.entries(search).map(([as, column]) => db.ref(column).as(as)));
  if (!made) throw new Error("no saved search came back");
  return made;
}
