import type { Handle } from "@/db/client/connect";
import { sessionRecords } from "@/db/queries/session-record";
import { insertAgreedValues, insertBridges, type DemoAgreedValue } from "@/db/seeds/demo/seed-baselines";
import { effectiveDof, standardUncertainty, uncertaintyOfKind } from "@/lib/domain/results/effects";
import { coolingCurve } from "@/lib/domain/results/methods/v1/cooling-curve";
import { equalNoise, reached } from "@/lib/domain/results/methods/v1/equal-noise";
import { sessionPoints } from "@/lib/domain/results/methods/v1/session-points";
import { setSpeedPoints, type SetSpeedPoint } from "@/lib/domain/results/methods/v1/set-speed-points";
import { dofOrNull, roundResult } from "@/lib/domain/results/rounding";
import { protocolPositionIds, sessionFigures } from "@/lib/domain/results/session-figures";
import { energyMean } from "@/lib/science/acoustics/levels";
import { combineIndependent, typeA } from "@/lib/science/statistics/uncertainty";

/** The spread of sessions shrinks with their number, what all of them share doesn't. */
function agreedOf(quantity: DemoAgreedValue["quantity"], points: readonly SetSpeedPoint[]): DemoAgreedValue[] {
  const [first] = points;
  const isLevel = quantity === "level_dba";
  const values = points.map((point) => (isLevel ? point.correctedDba : point.resistanceKPerW));
  const spread = typeA(values);
  const mean = isLevel ? energyMean(values) : spread?.mean;
  if (!first || !spread || mean === undefined) return [];
  const effects = isLevel ? first.levelEffects : first.deltaTEffects;
  const shared = combineIndependent([
    uncertaintyOfKind(effects, "shared_offset"),
    uncertaintyOfKind(effects, "shared_gain"),
  ]);
  const u = combineIndependent([spread.u, isLevel ? shared : shared / first.powerW]);
  return [{ quantity, setSpeed: first.setSpeedRpm, value: roundResult(mean), u: roundResult(u) }];
}

/** Agrees what the baseline unit reads, from the sessions of its first round on this bench version; of one, nothing. */
export async function agreeBaselineValues(db: Handle, sessionIds: readonly string[], from: Date): Promise<void> {
  const records = await sessionRecords(db, { sessionIds });
  const baselines = records.flatMap((record) => sessionFigures(record).baseline ?? []);
  const [record] = records;
  if (!record) return;
  const points = baselines.flatMap((baseline) => baseline.points);
  const speeds = [...new Set(points.map((point) => point.setSpeedRpm))];
  const mounts = baselines.reduce((sum, baseline) => sum + (baseline.points[0]?.mounts ?? 0), 0);
  await insertAgreedValues(db, {
    unitId: record.baselineUnitId,
    benchVersionId: record.benchVersionId,
    from,
    reason: `Mean over ${mounts} mounts in the ${records.length} sessions of its first round on this bench version.`,
    sessionIds,
    values: speeds.flatMap((speed) => {
      const here = points.filter((point) => point.setSpeedRpm === speed);
      return [...agreedOf("level_dba", here), ...agreedOf("thermal_resistance_kpw", here)];
    }),
  });
}

/** Bridges the session's baseline unit to another one that ran in it, at each level that both reach. */
export async function bridgeBaselines(
  db: Handle,
  {
    sessionId,
    toUnitId,
    levelsDba,
    at,
  }: { sessionId: string; toUnitId: string; levelsDba: readonly number[]; at: Date },
): Promise<void> {
  const [record] = await sessionRecords(db, { sessionIds: [sessionId] });
  if (!record) return;
  const { subjects } = sessionPoints(record, protocolPositionIds(record));
  const curveOf = (unitId: string) => {
    const subject = subjects.find((each) => each.baselineUnitId === unitId);
    const named = { sessionId, key: `baseline ${unitId}` };
    return subject && coolingCurve(setSpeedPoints(named, subject.points, record.grade));
  };
  const [from, to] = [curveOf(record.baselineUnitId), curveOf(toUnitId)];
  await insertBridges(db, {
    fromUnitId: record.baselineUnitId,
    toUnitId,
    benchVersionId: record.benchVersionId,
    sessionId,
    at,
    bridges: levelsDba.flatMap((levelDba) => {
      const reading = equalNoise(from, to, levelDba);
      if (!reached(reading)) return [];
      return [
        {
          levelDba,
          ratio: roundResult(reading.ratio),
          u: roundResult(standardUncertainty(reading.ratioEffects)),
          dof: dofOrNull(effectiveDof(reading.ratioEffects)),
        },
      ];
    }),
  });
}
