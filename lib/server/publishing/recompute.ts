import type { Handle } from "@/db/client/connect";
import {
  currentPublications,
  newestStandings,
  standingEntries,
  standingIsFilled,
  storedStandingRows,
} from "@/db/queries/recompute";
import { microphoneDistances } from "@/db/queries/publishing";
import { snapshotSchema } from "@/lib/contracts/publication";
import { digestOf } from "./digest";
import { computedSessions } from "./session-loading";
import { buildSnapshot, type ComputedSession } from "./snapshot";
import { standingInput, standingRows } from "./standing";

export interface RecomputeReport {
  what: "publications" | "standings";
  same: number;
  /** Made up by a demo's fill, without readings: nothing to recompute. */
  filled: number;
  /** What differs, by id and what was compared. */
  differing: string[];
}

/** Builds every current publication's snapshot again from the readings that stand and compares SHA-256. */
export async function recomputePublications(db: Handle): Promise<RecomputeReport> {
  const report: RecomputeReport = { what: "publications", same: 0, filled: 0, differing: [] };
  let session: ComputedSession | undefined;
  for await (const row of currentPublications(db)) {
    if (row.filled) {
      report.filled += 1;
      continue;
    }
    const snapshot = snapshotSchema.parse(row.snapshot);
    if (session?.record.sessionId !== snapshot.sessionId) {
      const sessions = await computedSessions(db, { sessionIds: [snapshot.sessionId] });
      session = sessions.get(snapshot.sessionId);
    }
    if (!session) {
      report.differing.push(`${row.id}: its session is gone`);
      continue;
    }
    const distances = await microphoneDistances(db, { benchVersionIds: [snapshot.benchVersionId] });
    const again = buildSnapshot(session, {
      round: {
        ...row.round,
        levelsDba: snapshot.levelsDba,
        headlineDba: snapshot.headlineDba,
        ruleVersionId: snapshot.ruleVersionId,
      },
      entry: {
        entryId: snapshot.entryId,
        revisionId: snapshot.revisionId,
        designId: snapshot.designId,
        ownerIds: snapshot.ownerIds,
        state: "published",
        everPublished: true,
        sessionId: snapshot.sessionId,
      },
      microphoneDistanceMm: distances.get(snapshot.benchVersionId) ?? Number.NaN,
      withBudgets: snapshot.budgets !== undefined,
      makers: snapshot.spectra?.makers ?? { entry: null, baseline: null },
    });
    if (digestOf(again) === row.sha256) report.same += 1;
    else report.differing.push(`publication ${row.id} of entry ${snapshot.entryId}`);
  }
  return report;
}

/** Draws the newest standing of every season, round and rule again from its stored seed and compares every row. */
export async function recomputeStandings(db: Handle): Promise<RecomputeReport> {
  const report: RecomputeReport = { what: "standings", same: 0, filled: 0, differing: [] };
  for (const standing of await newestStandings(db)) {
    if (await standingIsFilled(db, { standingId: standing.id })) {
      report.filled += 1;
      continue;
    }
    const entries = await standingEntries(db, { standingId: standing.id });
    const input = await standingInput(db, { ...standing, entries, rule: standing.rule });
    const again = standingRows(input);
    const stored = await storedStandingRows(db, { standingId: standing.id });
    if (digestOf(again) === digestOf(stored)) report.same += 1;
    else report.differing.push(`standing ${standing.id} (season ${standing.seasonId}, number ${standing.number})`);
  }
  return report;
}
