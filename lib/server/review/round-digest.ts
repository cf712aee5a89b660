import type { Handle } from "@/db/client/connect";
import type { RoundContext } from "@/db/queries/round-context";
import { sessionIdsOfRound } from "@/db/queries/round-context";
import { sessionRecords } from "@/db/queries/session-record";
import { standingSpectra } from "@/db/queries/spectra";
import { groupBy } from "@/lib/domain/group-by";
import { METHOD_V1 } from "@/lib/domain/results/methods/v1/parameters";
import { sessionFigures, splitFigure } from "@/lib/domain/results/session-figures";
import { digestOf } from "../publishing/digest";

/**
 * What a signature covers: SHA-256 over all reading ids that stand in the round's sessions, the results computed from
 * them, the ids of the spectra that stand, and the versions of rule, method, protocol, budget and bench. Publishing
 * computes it again and compares. A session without spectra is digested as before there were any.
 */
export async function roundDigest(db: Handle, round: RoundContext): Promise<string> {
  const sessionIds = await sessionIdsOfRound(db, { roundId: round.roundId });
  const records = await sessionRecords(db, { sessionIds });
  const spectra = groupBy(await standingSpectra(db, { sessionIds }), (each) => each.sessionId);
  return digestOf({
    roundId: round.roundId,
    entries: round.entries.map(({ entryId, sessionId }) => ({ entryId, sessionId })),
    levelsDba: round.levelsDba,
    headlineDba: round.headlineDba,
    ruleVersionId: round.ruleVersionId,
    methodVersion: METHOD_V1.version,
    sessions: records.map((record) => {
      const { baseline, entries } = sessionFigures(record);
      return {
        sessionId: record.sessionId,
        versions: [record.benchVersionId, record.protocolVersionId, record.budgetVersionId, record.baselineUnitId],
        readings: [
          ...record.backgrounds.map((each) => each.readingId),
          ...record.runs.flatMap((run) => [`${run.runId} ${run.state}`, ...run.readings.map((reading) => reading.id)]),
        ].sort(),
        spectra: spectra.get(record.sessionId)?.map((each) => each.id),
        results: [baseline, ...entries].flatMap((each) =>
          each
            ? each.points.map((point) => ({
                subject: each.subject.key,
                setSpeed: point.setSpeedRpm,
                level: splitFigure(point.correctedDba, point.levelEffects),
                upperBound: point.upperBound,
                deltaT: splitFigure(point.deltaTK, point.deltaTEffects),
              }))
            : [],
        ),
      };
    }),
  });
}
