import { appDb, publicDb } from "@/db/client/handles";
import { sessionRecords } from "@/db/queries/session-record";
import { entriesByIds } from "@/db/queries/shown/entries";
import { shownBaselineUnits, shownEntriesByIds, shownPublications, shownRevisions } from "@/db/queries/shown/sheet";
import { snapshotSchema } from "@/lib/contracts/publication";
import { ExpectedError } from "@/lib/domain/expected-error";
import type { MeasuredPoint } from "@/lib/domain/results/measured-point";
import { sessionPoints } from "@/lib/domain/results/methods/v1/session-points";
import { protocolPositionIds } from "@/lib/domain/results/session-figures";
import { indexItem } from "./list-designs";

/** Most that can be laid over a baseline at once: more lines than that nobody tells apart. */
export const compareMost = 4;

/** How far figures of several entries may stand side by side; see "Comparable or not". */
export type Comparability = "same-axis" | "ratios" | "not-comparable";

/**
 * Two to four public entries with all that laying them over their baselines takes: the measured points themselves, so
 * that the page reads any level with the very functions that made the published figures.
 *
 * @param entryIds one to four; those that are not public now are left out and counted
 * @throws ExpectedError not_found when none is public
 */
export async function readCompare({ entryIds }: { entryIds: readonly string[] }) {
  const db = publicDb();
  const ids = [...new Set(entryIds)].slice(0, compareMost);
  const found = await shownEntriesByIds(db, { entryIds: ids });
  const entries = ids.flatMap((id) => found.find((entry) => entry.entryId === id) ?? []);
  if (entries.length === 0) throw new ExpectedError("not_found", "None of these entries is public.");
  const publications = (await shownPublications(db, { entryIds: entries.map((entry) => entry.entryId) })).filter(
    (publication) => publication.current,
  );
  const snapshots = new Map(publications.map((row) => [row.entryId, snapshotSchema.parse(row.snapshot)]));
  const listed = await entriesByIds(db, { entryIds: entries.map((entry) => entry.entryId) });
  const items = new Map(listed.map(indexItem).map((item) => [item.entryId, item]));
  const sessionIds = [...new Set([...snapshots.values()].map((snapshot) => snapshot.sessionId))];
  const records = await sessionRecords(appDb(), { sessionIds });
  const points = new Map<string, readonly MeasuredPoint[]>();
  const sessions = records.map((record) => {
    const { subjects } = sessionPoints(record, protocolPositionIds(record));
    for (const subject of subjects)
      if (subject.entryId) points.set(`${record.sessionId} ${subject.entryId}`, subject.points);
    return {
      id: record.sessionId,
      grade: record.grade,
      baselineUnitId: record.baselineUnitId,
      baselinePoints: subjects.find((subject) => subject.baselineUnitId === record.baselineUnitId)?.points ?? [],
    };
  });
  const [revisions, units] = await Promise.all([
    shownRevisions(db, { revisionIds: entries.map((entry) => entry.revisionId) }),
    shownBaselineUnits(db, { unitIds: entries.map((entry) => entry.baselineUnitId) }),
  ]);
  return {
    missing: ids.length - entries.length,
    comparability: comparabilityOf(entries),
    sessions,
    units,
    revisions,
    entries: entries.flatMap((entry) => {
      const snapshot = snapshots.get(entry.entryId);
      const item = items.get(entry.entryId);
      if (!snapshot || !item) return [];
      const own = points.get(`${snapshot.sessionId} ${entry.entryId}`) ?? [];
      return [{ ...entry, snapshot, item, sessionId: snapshot.sessionId, points: own }];
    }),
  };
}
export type CompareAnswer = Awaited<ReturnType<typeof readCompare>>;

/** One axis within one bench version, protocol and baseline unit; ratios within one unit; else only through a bridge. */
export function comparabilityOf(
  entries: readonly { benchVersionId: string; protocolVersionId: string; baselineUnitId: string }[],
): Comparability {
  const count = (of: (entry: (typeof entries)[number]) => string) => new Set(entries.map(of)).size;
  if (count((entry) => entry.baselineUnitId) > 1) return "not-comparable";
  return count((entry) => entry.benchVersionId) > 1 || count((entry) => entry.protocolVersionId) > 1
    ? "ratios"
    : "same-axis";
}
