import { takeSenderLock, type SenderLock } from "@/db/queries/search-lock";
import { deleteOutboxRows, outboxRows, searchCounts } from "@/db/queries/search-outbox";
import { searchBuild, searchState } from "@/db/queries/search-build";
import { indexDigest } from "@/search/document";
import { DESIGNS_INDEX } from "@/search/settings";
import { hasOurSettings, ourIndexes } from "@/search/write";
import { rest } from "../jobs/rest";
import { log } from "../log";
import { outlet, type Outlet } from "./outlet";
import { beginRebuild, canGoOn, finishRebuild, giveUp, sendPage } from "./rebuild";
import { sendEntries } from "./send-entries";

const batchSize = 500;
const pollMs = 5_000;
const backOffMs = { first: 250, most: 10_000 };

/** What a turn found to do: more at once, nothing until a mark comes. */
type Turn = "more" | "idle";

/**
 * Keeps the search index as the world sees the database, as long as the process runs. Of all processes one is the
 * sender at a time, by a lock of the database's session; the others wait for it to end. Errors are logged and tried
 * again after a while that doubles.
 */
export async function runSearchSender(signal: AbortSignal, from: Outlet = outlet()): Promise<void> {
  let wait = backOffMs.first;
  while (!signal.aborted) {
    try {
      const lock = await takeSenderLock(from.db);
      if (lock) await sendWhileLocked(from, lock, signal, () => (wait = backOffMs.first));
      else await rest(pollMs, signal);
    } catch (error) {
      if (signal.aborted) return;
      log().warn({ err: error, againInMs: wait }, "search sender");
      await rest(wait, signal);
      wait = Math.min(2 * wait, backOffMs.most);
    }
  }
}

async function sendWhileLocked(from: Outlet, lock: SenderLock, signal: AbortSignal, worked: () => void): Promise<void> {
  const either = AbortSignal.any([signal, lock.lost]);
  try {
    await checkRebuild(from);
    while (!either.aborted) {
      const turn = await takeTurn(from);
      worked();
      if (turn === "idle") await lock.woken(pollMs, either);
    }
  } finally {
    await lock.release();
  }
}

/** A rebuild that an earlier sender left goes on, or is given up. */
async function checkRebuild(from: Outlet): Promise<void> {
  const build = await searchBuild(from.db);
  if (!build) return;
  const built = (await ourIndexes(from.client())).get(build.indexUid)?.documents;
  if (!(await canGoOn(from, build, built))) await giveUp(from, build);
}

/**
 * One turn: sends the marks that wait to every index there is, then a page of a rebuild, or begins one where it is
 * needed. Everything is sent in the order in which it was read, so a later state is never overwritten by an earlier one.
 */
export async function takeTurn(from: Outlet, now = new Date()): Promise<Turn> {
  const build = await searchBuild(from.db);
  // Before the indexes are looked at: what is published later has a mark, which the next turn sends.
  const counts = await searchCounts(from.db);
  const indexes = await ourIndexes(from.client());
  if (build && !indexes.has(build.indexUid)) {
    await giveUp(from, build);
    return "more";
  }
  const live = indexes.get(DESIGNS_INDEX);
  const tooFew = live === undefined || live.documents < counts.published - counts.waiting - counts.parked;
  if (!build && (tooFew || !(await isOurs(from)))) {
    await beginRebuild(from, now);
    return "more";
  }
  const targets = [...(live ? [DESIGNS_INDEX] : []), ...(build ? [build.indexUid] : [])];
  const rows = await outboxRows(from.db, { limit: batchSize });
  if (rows.length > 0) {
    await sendEntries(from, targets, [...new Set(rows.map((row) => row.entryId))]);
    await deleteOutboxRows(from.db, { ids: rows.map((row) => row.id) });
  }
  if (!build) return rows.length > 0 ? "more" : "idle";
  if (await sendPage(from, build)) return "more";
  if ((await finishRebuild(from, build)) === "anew") {
    await giveUp(from, build);
    // As an error, so that the next try waits its while.
    throw new Error("the index that was rebuilt does not hold what it should");
  }
  return "more";
}

/** Whether the index was filled under our settings; one that a write to a restarted service made has none. */
async function isOurs({ db, client }: Outlet): Promise<boolean> {
  return (await searchState(db)).settingsSha256 === indexDigest() && (await hasOurSettings(client(), DESIGNS_INDEX));
}
