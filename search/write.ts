import type { Meilisearch, Task } from "meilisearch";
import type { SearchDocument } from "./document";
import { DESIGNS_INDEX, DOCUMENT_KEY, INDEX_SETTINGS } from "./settings";

/** The service refused what was sent, for a reason that lies in a document and not in the service. */
export class RefusedDocuments extends Error {
  override name = "RefusedDocuments";
}

/** A task came to a bad end for any other reason: an index that went away, a full disk. */
export class FailedTask extends Error {
  override name = "FailedTask";
}

const buildPrefix = `${DESIGNS_INDEX}_build_`;
/** Codes of failures that another try of the same documents can't mend. */
const documentFault = /document|primary_key|^max_fields_limit_exceeded$/;

function checkTask(task: Task): void {
  if (task.status === "succeeded") return;
  const code = task.error?.code ?? "";
  const message = `${task.type} of ${task.indexUid ?? "indexes"} ${task.status}: ${task.error?.message ?? "no reason given"}`;
  if (task.status === "failed" && documentFault.test(code)) throw new RefusedDocuments(message);
  throw new FailedTask(message);
}

/** Puts and takes documents in several indexes, and waits until each of them is searchable. @throws the errors above */
export async function writeDocuments(
  client: Meilisearch,
  {
    indexes,
    documents,
    gone,
  }: { indexes: readonly string[]; documents: readonly SearchDocument[]; gone: readonly string[] },
): Promise<void> {
  const waiting: Promise<Task>[] = [];
  for (const uid of indexes) {
    const index = client.index(uid);
    if (documents.length > 0) waiting.push(index.addDocuments([...documents], { primaryKey: DOCUMENT_KEY }).waitTask());
    if (gone.length > 0) waiting.push(index.deleteDocuments([...gone]).waitTask());
  }
  // All are waited for even when one fails, so that nothing is on its way when the caller tries again.
  const ends = await Promise.allSettled(waiting);
  for (const end of ends) {
    if (end.status === "rejected") throw end.reason;
  }
  for (const end of ends) if (end.status === "fulfilled") checkTask(end.value);
}

/** Names and sizes of our indexes: the one that readers search, and those of rebuilds. */
export async function ourIndexes(client: Meilisearch): Promise<Map<string, { documents: number; updatedAt: Date }>> {
  const { results } = await client.getIndexes({ limit: 1000 });
  const ours = results.filter(({ uid }) => uid === DESIGNS_INDEX || uid.startsWith(buildPrefix));
  const sized = await Promise.all(
    ours.map(async (index) => {
      const { numberOfDocuments } = await client.index(index.uid).getStats();
      return [index.uid, { documents: numberOfDocuments, updatedAt: new Date(index.updatedAt ?? 0) }] as const;
    }),
  );
  return new Map(sized);
}

export const isBuild = (uid: string): boolean => uid.startsWith(buildPrefix);
export const buildName = (at: Date): string => `${buildPrefix}${at.getTime()}`;

/** Makes an empty index with our settings. */
export async function createIndex(client: Meilisearch, uid: string): Promise<void> {
  checkTask(await client.createIndex(uid, { primaryKey: DOCUMENT_KEY }).waitTask());
  checkTask(await client.index(uid).updateSettings(INDEX_SETTINGS).waitTask());
}

/** Whether an index has our settings; one that a late write made by itself has none. */
export async function hasOurSettings(client: Meilisearch, uid: string): Promise<boolean> {
  const settings = await client.index(uid).getSettings();
  const same = (a: unknown, b: readonly string[]): boolean =>
    Array.isArray(a) && JSON.stringify([...a].sort()) === JSON.stringify([...b].sort());
  return (
    same(settings.filterableAttributes, INDEX_SETTINGS.filterableAttributes) &&
    same(settings.sortableAttributes, INDEX_SETTINGS.sortableAttributes) &&
    same(settings.displayedAttributes, INDEX_SETTINGS.displayedAttributes) &&
    JSON.stringify(settings.rankingRules) === JSON.stringify(INDEX_SETTINGS.rankingRules)
  );
}

/** Deletes an index; one that is not there is no error. */
export async function dropIndex(client: Meilisearch, uid: string): Promise<void> {
  const task = await client.deleteIndex(uid).waitTask();
  if (task.error?.code !== "index_not_found") checkTask(task);
}

/** Readers search the built index from now on: one task that exchanges the two, or renames where there was none. */
export async function exchange(client: Meilisearch, built: string, hasLive: boolean): Promise<void> {
  checkTask(await client.swapIndexes([{ indexes: [built, DESIGNS_INDEX], rename: !hasLive }]).waitTask());
}

/** Waits for the exchanges that were asked for and haven't ended. */
export async function exchangesEnded(client: Meilisearch): Promise<void> {
  const { results } = await client.tasks.getTasks({ types: ["indexSwap"], statuses: ["enqueued", "processing"] });
  await client.tasks.waitForTasks(results.map((task) => task.uid));
}

/** One page of what an index holds: ids and digests, in the service's own order. */
export async function documentPage(
  client: Meilisearch,
  uid: string,
  { offset, limit }: { offset: number; limit: number },
): Promise<{ id: string; rev: string }[]> {
  const { results } = await client.index<{ id: string; rev: string }>(uid).getDocuments({
    fields: ["id", "rev"],
    offset,
    limit,
  });
  return results;
}
