import { beginBuild, endBuild, markSwapping, saveCursor, type SearchBuild } from "@/db/queries/search-build";
import { outboxRows, searchCounts } from "@/db/queries/search-outbox";
import { searchSourcesAfter } from "@/db/queries/search-sources";
import { indexDigest, searchDocument } from "@/search/document";
import { DESIGNS_INDEX } from "@/search/settings";
import {
  RefusedDocuments,
  buildName,
  createIndex,
  dropIndex,
  exchange,
  exchangesEnded,
  hasOurSettings,
  isBuild,
  ourIndexes,
  writeDocuments,
} from "@/search/write";
import { log } from "../log";
import type { Outlet } from "./outlet";
import { sendEntries } from "./send-entries";

/** A page of a rebuild; larger ones keep the stand-in, which has one thread, from answering searches. */
const pageSize = 1000;

/** Begins to fill an index beside the one that readers search; what is left of earlier rebuilds goes. */
export async function beginRebuild({ db, client }: Outlet, now: Date): Promise<void> {
  for (const uid of (await ourIndexes(client())).keys()) if (isBuild(uid)) await dropIndex(client(), uid);
  const indexUid = buildName(now);
  const { published } = await searchCounts(db);
  // The row comes first: an index without its row would be dropped by the next rebuild, a row without its index here.
  await beginBuild(db, { indexUid, total: published });
  await createIndex(client(), indexUid);
  log().info({ index: indexUid, entries: published }, "search rebuild begins");
}

/**
 * Whether a rebuild that an earlier sender left can go on. Not when the indexes were about to be exchanged, since then
 * nobody knows which is which, and not when the service forgot the index.
 */
export async function canGoOn({ client }: Outlet, build: SearchBuild, built: number | undefined): Promise<boolean> {
  if (build.swapping) {
    await exchangesEnded(client());
    return false;
  }
  return built !== undefined && (await hasOurSettings(client(), build.indexUid));
}

/** Gives a rebuild up; another begins when it is still needed. */
export async function giveUp({ db, client }: Outlet, build: SearchBuild): Promise<void> {
  log().warn({ index: build.indexUid }, "search rebuild begins anew");
  await dropIndex(client(), build.indexUid);
  await endBuild(db, {});
}

/** Sends the next page of all entries to the built index alone. @returns false when there is none left */
export async function sendPage(outlet: Outlet, build: SearchBuild): Promise<boolean> {
  const sources = await searchSourcesAfter(outlet.db, { cursorId: build.cursorId, limit: pageSize });
  const last = sources.at(-1);
  if (!last) return false;
  const indexes = [build.indexUid];
  try {
    await writeDocuments(outlet.client(), { indexes, documents: sources.map(searchDocument), gone: [] });
  } catch (error) {
    if (!(error instanceof RefusedDocuments)) throw error;
    await sendEntries(
      outlet,
      indexes,
      sources.map((source) => source.entryId),
    );
  }
  await saveCursor(outlet.db, { cursorId: last.entryId, sent: build.sent + sources.length });
  return true;
}

/**
 * Lets readers search the built index, once it holds exactly what the world sees. @returns "waits" while marks wait,
 * "anew" when the built index isn't what it should be
 */
export async function finishRebuild({ db, client }: Outlet, build: SearchBuild): Promise<"done" | "waits" | "anew"> {
  const { published, parked } = await searchCounts(db);
  const indexes = await ourIndexes(client());
  const built = indexes.get(build.indexUid);
  const settled = built !== undefined && (await hasOurSettings(client(), build.indexUid));
  // Read after the sizes: what was published or withdrawn meanwhile has a mark by now.
  if ((await outboxRows(db, { limit: 1 })).length > 0) return "waits";
  if (!settled || built.documents > published || built.documents < published - parked) return "anew";
  await markSwapping(db);
  await exchange(client(), build.indexUid, indexes.has(DESIGNS_INDEX));
  await endBuild(db, { settingsSha256: indexDigest() });
  log().info({ documents: built.documents }, "search rebuild done");
  return "done";
}
