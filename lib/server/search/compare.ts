import type { Handle } from "@/db/client/connect";
import { noteComparison, searchBuild } from "@/db/queries/search-build";
import { markDirty, waitingAmong } from "@/db/queries/search-outbox";
import { searchSourcesAfter, searchSourcesByIds } from "@/db/queries/search-sources";
import { searchDocument } from "@/search/document";
import { DESIGNS_INDEX } from "@/search/settings";
import { documentPage, dropIndex, isBuild, ourIndexes } from "@/search/write";
import { log } from "../log";
import { outlet, type Outlet } from "./outlet";

const pageSize = 1000;
const day = 86_400_000;

/** Digests of all public entries by id. */
async function databaseRevs(db: Handle): Promise<Map<string, string>> {
  const revs = new Map<string, string>();
  for (let cursorId: string | null = null; ;) {
    const page = await searchSourcesAfter(db, { cursorId, limit: pageSize });
    for (const source of page) revs.set(source.entryId, searchDocument(source).rev);
    const last = page.at(-1);
    if (!last) return revs;
    cursorId = last.entryId;
  }
}

async function indexRevs({ client }: Outlet): Promise<Map<string, string>> {
  const revs = new Map<string, string>();
  for (let offset = 0; ; offset += pageSize) {
    const page = await documentPage(client(), DESIGNS_INDEX, { offset, limit: pageSize });
    for (const { id, rev } of page) revs.set(id, rev);
    if (page.length < pageSize) return revs;
  }
}

/**
 * Compares the index with the database, document by document. Entries that wait to be sent anyway, or changed while it
 * looked, are no differences.
 *
 * @returns ids that differ; undefined where there is no index: the sender makes one
 */
export async function indexDifferences(from: Outlet): Promise<string[] | undefined> {
  if (!(await ourIndexes(from.client())).has(DESIGNS_INDEX)) return undefined;
  const held = await indexRevs(from);
  const wanted = await databaseRevs(from.db);
  const suspects = [...new Set([...held.keys(), ...wanted.keys()])].filter((id) => held.get(id) !== wanted.get(id));
  return stillDiffering(from.db, suspects, held);
}

/**
 * The nightly comparison: marks what differs, so that the sender mends it, and reports it. An index that a rebuild put
 * aside a day ago is dropped.
 *
 * @returns ids that differed; undefined where there is no index
 */
export async function compareIndex(from: Outlet = outlet(), now = new Date()): Promise<string[] | undefined> {
  const build = await searchBuild(from.db);
  for (const [uid, { updatedAt }] of await ourIndexes(from.client())) {
    const isOld = now.getTime() - updatedAt.getTime() > day;
    if (isBuild(uid) && uid !== build?.indexUid && isOld) await dropIndex(from.client(), uid);
  }
  const differing = await indexDifferences(from);
  if (!differing) return undefined;
  await markDirty(from.db, { entryIds: differing });
  await noteComparison(from.db, { differences: differing.length });
  if (differing.length > 0)
    log().error(
      { differences: differing.length, entryIds: differing.slice(0, 20) },
      "search index differed and is mended",
    );
  else log().info("search index agrees with the database");
  return differing;
}

/** Those that differ from the index still, as the database is now, and aren't about to be sent. */
async function stillDiffering(db: Handle, suspects: string[], held: ReadonlyMap<string, string>): Promise<string[]> {
  const differing: string[] = [];
  for (let at = 0; at < suspects.length; at += pageSize) {
    const entryIds = suspects.slice(at, at + pageSize);
    const waiting = await waitingAmong(db, { entryIds });
    const sources = await searchSourcesByIds(db, { entryIds });
    const revs = new Map(sources.map((source) => [source.entryId, searchDocument(source).rev]));
    differing.push(...entryIds.filter((id) => !waiting.has(id) && revs.get(id) !== held.get(id)));
  }
  return differing;
}
