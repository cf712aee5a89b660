import type { Handle } from "@/db/client/connect";
import { readingsOfSession } from "@/db/queries/bench-runs";
import { benchVersionOf, protocolOf, sessionHead } from "@/db/queries/bench-sessions";
import { sessionRecords } from "@/db/queries/session-record";
import type { GateInput } from "@/lib/domain/bench/session-gates";
import { sessionPoints } from "@/lib/domain/results/methods/v1/session-points";
import { protocolPositionIds } from "@/lib/domain/results/session-figures";
import { combineIndependent } from "@/lib/science/statistics/uncertainty";

/** What the gates of a session look at, from its readings as they stand. */
export async function gateInput(db: Handle, { sessionId }: { sessionId: string }): Promise<GateInput> {
  const session = await sessionHead(db, { sessionId });
  const [record] = await sessionRecords(db, { sessionIds: [sessionId] });
  if (!session || !record) throw new Error(`no session ${sessionId}`);
  const protocol = await protocolOf(db, { protocolVersionId: session.protocolVersionId });
  const bench = await benchVersionOf(db, { benchVersionId: session.benchVersionId });
  const readings = await readingsOfSession(db, { sessionId });
  const standing = readings.filter((reading) => reading.supersededBy === null);
  const nameOf = (positionId: string | null) => record.positions.find((each) => each.id === positionId)?.name ?? "";
  const { subjects } = sessionPoints(record, protocolPositionIds(record));
  const baseline = subjects.find((subject) => subject.baselineUnitId === session.baselineUnitId);
  const done = record.runs.filter((run) => run.state === "done");
  const isBaseline = (run: (typeof done)[number] | undefined) => run?.baselineUnitId === session.baselineUnitId;
  const part = (quantity: "level_dba" | "delta_t_k") =>
    combineIndependent(
      record.budget
        .filter((each) => each.quantity === quantity && (each.kind === "own_run" || each.kind === "own_mount"))
        .map((each) => each.u),
    );
  return {
    calibratorLevelDb: bench.calibratorLevelDb,
    calibratorDriftMaxDb: protocol.calibratorDriftMaxDb,
    ambientMinC: protocol.ambientMinC,
    ambientMaxC: protocol.ambientMaxC,
    positions: protocol.positions,
    calibrator: standing
      .filter((reading) => reading.quantity === "calibrator_db")
      .map((reading) => ({
        position: nameOf(reading.positionId),
        phase: reading.phase ?? "before",
        valueDb: reading.value,
      })),
    background: record.backgrounds.map((each) => ({ position: nameOf(each.positionId), valueDba: each.valueDba })),
    ambientC: standing.flatMap((reading) =>
      reading.quantity === "ambient_c"
        ? [reading.value]
        : typeof reading.detail.ambientC === "number"
          ? [reading.detail.ambientC]
          : [],
    ),
    baseline: protocol.setSpeeds.map((setSpeed) => {
      const points = (baseline?.points ?? []).filter((point) => point.setSpeedRpm === setSpeed);
      return {
        setSpeed,
        levelsDba: points.map((point) => point.levelReadDba),
        deltaTK: points.map((point) => point.deltaTK),
      };
    }),
    baselineFirst: isBaseline(done[0]),
    baselineLast: isBaseline(done.at(-1)),
    repeatabilityDb: part("level_dba"),
    repeatabilityK: part("delta_t_k"),
  };
}
