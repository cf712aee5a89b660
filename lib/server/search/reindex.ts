import { askForRebuild, searchBuild, searchState } from "@/db/queries/search-build";
import { takeSenderLock } from "@/db/queries/search-lock";
import { searchCounts } from "@/db/queries/search-outbox";
import { indexDigest } from "@/search/document";
import { outlet, type Outlet } from "./outlet";
import { takeTurn } from "./sender";

export interface ReindexProgress {
  /** Entries sent to the index that is being built, of how many. */
  sent: number;
  total: number;
  /** Whether another process, the worker, does the work. */
  byWorker: boolean;
}

const lookAgainMs = 500;

/**
 * Fills the index anew beside the one that readers search and waits until it took that one's place. By the worker when
 * one runs, else by this process, which is the sender meanwhile.
 *
 * @param onProgress hears of it about twice a second, or after each page
 */
export async function reindex(onProgress: (progress: ReindexProgress) => void, from: Outlet = outlet()): Promise<void> {
  await askForRebuild(from.db);
  for (;;) {
    const lock = await takeSenderLock(from.db);
    if (lock) {
      try {
        while (!lock.lost.aborted) {
          const turn = await takeTurn(from);
          await report(from, onProgress, false);
          if (turn === "idle" && (await isDone(from))) return;
        }
      } finally {
        await lock.release();
      }
    }
    if (await isDone(from)) return;
    await report(from, onProgress, true);
    await new Promise((resolve) => setTimeout(resolve, lookAgainMs));
  }
}

/** The new index is in its place and no entry waits. */
async function isDone({ db }: Outlet): Promise<boolean> {
  const { settingsSha256 } = await searchState(db);
  return settingsSha256 === indexDigest() && !(await searchBuild(db)) && (await searchCounts(db)).waiting === 0;
}

async function report(
  { db }: Outlet,
  onProgress: (progress: ReindexProgress) => void,
  byWorker: boolean,
): Promise<void> {
  const build = await searchBuild(db);
  if (build) onProgress({ sent: build.sent, total: build.total, byWorker });
}
