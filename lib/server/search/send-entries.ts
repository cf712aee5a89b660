import type { Handle } from "@/db/client/connect";
import { parkEntry, unparkEntries } from "@/db/queries/search-outbox";
import { searchSourcesByIds } from "@/db/queries/search-sources";
import { searchDocument, type SearchDocument } from "@/search/document";
import { RefusedDocuments, writeDocuments } from "@/search/write";
import { log } from "../log";
import type { Outlet } from "./outlet";

/** Documents of some entries as they are now; entries without one are not public. */
export type ReadDocuments = (entryIds: readonly string[]) => Promise<SearchDocument[]>;

/**
 * The public view is all that is read, so nothing else can be sent. It is read through the application's handle: a
 * replica that lags would have a change sent as it was before, and no mark would be left of it.
 */
export const publicDocuments =
  (db: Handle): ReadDocuments =>
  async (entryIds) =>
    (await searchSourcesByIds(db, { entryIds })).map(searchDocument);

/**
 * Brings entries in the indexes to what the world sees of them now. Where the service refuses the batch, halves of it
 * are tried, down to the entry that is at fault: that one is set aside with its reason.
 *
 * @throws when the service can't be reached or fails for a reason that is not a document's
 */
export async function sendEntries(
  { db, client }: Outlet,
  indexes: readonly string[],
  entryIds: readonly string[],
  read: ReadDocuments = publicDocuments(db),
): Promise<void> {
  if (entryIds.length === 0 || indexes.length === 0) return;
  const documents = await read(entryIds);
  const found = new Set(documents.map((document) => document.id));
  const gone = entryIds.filter((id) => !found.has(id));
  try {
    await writeDocuments(client(), { indexes, documents, gone });
    await unparkEntries(db, { entryIds });
  } catch (error) {
    if (!(error instanceof RefusedDocuments)) throw error;
    const [only] = entryIds;
    if (entryIds.length === 1 && only !== undefined) {
      log().error({ entryId: only, err: error }, "the search service refuses an entry");
      await parkEntry(db, { entryId: only, reason: error.message });
      return;
    }
    const half = Math.ceil(entryIds.length / 2);
    await sendEntries({ db, client }, indexes, entryIds.slice(0, half), read);
    await sendEntries({ db, client }, indexes, entryIds.slice(half), read);
  }
}
