import type { Handle } from "../client/connect";

/** A rebuild on its way: where it has got to, so that another sender can go on. */
export interface SearchBuild {
  indexUid: string;
  cursorId: string | null;
  sent: number;
  total: number;
  swapping: boolean;
}

export async function searchBuild(db: Handle): Promise<SearchBuild | undefined> {
  return db("search_build").first({
    indexUid: "index_uid",
    cursorId: "cursor_id",
    sent: "sent",
    total: "total",
    swapping: "swapping",
  });
}

export async function beginBuild(db: Handle, { indexUid, total }: { indexUid: string; total: number }): Promise<void> {
  await db("search_build")
    .insert({ index_uid: indexUid, total, cursor_id: null, sent: 0, swapping: false, began_at: db.fn.now() })
    .onConflict("only_one")
    .merge();
}

export async function saveCursor(db: Handle, { cursorId, sent }: { cursorId: string; sent: number }): Promise<void> {
  await db("search_build").update({ cursor_id: cursorId, sent });
}

/** Says that the indexes are about to be exchanged: who finds this can't know whether they were. */
export async function markSwapping(db: Handle): Promise<void> {
  await db("search_build").update({ swapping: true });
}

/** Ends a rebuild; with a digest, the index that readers search was made under it. */
export async function endBuild(db: Handle, { settingsSha256 }: { settingsSha256?: string }): Promise<void> {
  await db.transaction(async (tx) => {
    await tx("search_build").delete();
    if (settingsSha256 !== undefined) await tx("search_state").update({ settings_sha256: settingsSha256 });
  });
}

export interface SearchState {
  settingsSha256: string | null;
  comparedAt: Date | null;
  differences: number | null;
}

export async function searchState(db: Handle): Promise<SearchState> {
  const state = await db("search_state").first<SearchState | undefined>({
    settingsSha256: "settings_sha256",
    comparedAt: "compared_at",
    differences: "differences",
  });
  return state ?? { settingsSha256: null, comparedAt: null, differences: null };
}

/** Asks whoever is the sender to fill the index anew. */
export async function askForRebuild(db: Handle): Promise<void> {
  await db.transaction(async (tx) => {
    await tx("search_state").update({ settings_sha256: null });
    await tx.raw("select pg_notify('search_outbox', '')");
  });
}

export async function noteComparison(db: Handle, { differences }: { differences: number }): Promise<void> {
  await db("search_state").update({ compared_at: db.fn.now(), differences });
}
