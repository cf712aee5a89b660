import { appDb } from "@/db/client/handles";
import { readingsOfSession, runsOfSession, type BenchReading } from "@/db/queries/bench-runs";
import { positionsOf, sessionHead } from "@/db/queries/bench-sessions";
import { handlesOf } from "@/db/queries/people";
import type { ReviewEntryReadings, ReviewReading } from "@/lib/contracts/review";
import type { Actor } from "@/lib/domain/accounts/actor";
import { ExpectedError } from "@/lib/domain/expected-error";
import { groupBy } from "@/lib/domain/group-by";
import { reviewEntries } from "./read-round";
import { demandReviewRound } from "./review-access";

/** Every raw reading behind an entry's figures, superseded ones with their reasons; for whoever may see its round. */
export async function readEntryForReview(
  actor: Actor,
  { roundId, entryId }: { roundId: string; entryId: string },
): Promise<ReviewEntryReadings> {
  const db = appDb();
  const { round } = await demandReviewRound(db, actor, roundId);
  const wanted = round.entries.filter((entry) => entry.entryId === entryId);
  const [entry] = await reviewEntries(db, round, wanted);
  if (!entry) throw new ExpectedError("not_found", "There is no such entry in this round.");
  if (entry.sessionId === null) return { roundId, entry, runs: [], sessionReadings: [] };
  const { sessionId } = entry;
  const session = await sessionHead(db, { sessionId });
  const [runs, readings, positions] = await Promise.all([
    runsOfSession(db, { sessionId }),
    readingsOfSession(db, { sessionId }),
    positionsOf(db, { benchVersionId: session?.benchVersionId ?? "" }),
  ]);
  const handles = await handlesOf(db, { personIds: readings.map((reading) => reading.takenBy) });
  const item = (reading: BenchReading): ReviewReading => ({
    readingId: reading.id,
    quantity: reading.quantity,
    position: positions.find((each) => each.id === reading.positionId)?.name ?? null,
    rotorPosition: reading.rotorPosition,
    value: reading.value,
    unit: reading.unit,
    source: reading.source,
    takenBy: handles.get(reading.takenBy) ?? null,
    takenAt: reading.takenAt.toISOString(),
    reason: reading.reason,
    supersededBy: reading.supersededBy,
  });
  const byRun = groupBy(readings, (reading) => reading.runId);
  return {
    roundId,
    entry,
    runs: runs
      .filter((run) => run.entryId === entryId || run.entryId === null)
      .map((run) => ({
        runId: run.id,
        ofBaseline: run.entryId === null,
        setSpeed: run.setSpeed,
        mountNumber: run.mountNumber,
        repeatNumber: run.repeatNumber,
        ordinal: run.ordinal,
        state: run.state,
        reason: run.reason,
        readings: (byRun.get(run.id) ?? []).map(item),
      })),
    sessionReadings: (byRun.get(null) ?? []).map(item),
  };
}
