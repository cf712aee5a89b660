import type { Person } from "@/lib/domain/accounts/actor";
import { startBenchSession } from "@/lib/server/baselines/start-bench-session";
import { addRun, setRunState } from "@/lib/server/bench/runs";
import { addSessionReading } from "@/lib/server/bench/session-readings";
import { endSession } from "@/lib/server/bench/sessions";
import { allTicked, asked } from "./bench-steps";

export interface Qualifying {
  by: Person;
  benchVersionId: string;
  budgetVersionId: string;
  protocolVersionId: string;
  baselineUnitId: string;
  /** A bridge to this unit instead. */
  bridgeUnitId?: string;
  positionId: string;
  setSpeeds: readonly number[];
  mounts?: number;
  /** Level and ΔT of a mount of a unit. */
  reads: (at: { mount: number; setSpeed: number; unitId: string }) => { levelDba: number; deltaTK: number };
  at: Date;
}

/** A whole session without a round: calibrator, background, every mount at every set speed, calibrator, end. */
export async function qualifyBench(of: Qualifying) {
  const by = asked(of.by);
  const { positionId, baselineUnitId, bridgeUnitId } = of;
  const { sessionId } = await startBenchSession(by, {
    benchVersionId: of.benchVersionId,
    budgetVersionId: of.budgetVersionId,
    protocolVersionId: of.protocolVersionId,
    purpose: bridgeUnitId ? "bridge" : "qualification",
    baselineUnitId,
    bridgeUnitId,
    checklist: allTicked,
    at: of.at,
  });
  const calibrate = (phase: "before" | "after") =>
    addSessionReading(by, { sessionId, reading: { quantity: "calibrator_db", positionId, phase, value: 94 } });
  await calibrate("before");
  const background = { quantity: "background_dba" as const, positionId, value: 20, durationS: 20, heated: false };
  await addSessionReading(by, { sessionId, reading: background });
  const mount = async (unitId: string, mountNumber: number) => {
    for (const setSpeed of of.setSpeeds) {
      const { levelDba, deltaTK } = of.reads({ mount: mountNumber, setSpeed, unitId });
      const typed = { source: "typed" as const };
      const { runId, version } = await addRun(by, {
        ...{ sessionId, entryId: null, baselineUnitId: unitId, setSpeed, mountNumber, repeatNumber: 1 },
        readings: [
          { quantity: "level_dba", value: levelDba, positionId, ...typed },
          { quantity: "sensor_c", value: 22 + deltaTK, ...typed },
          { quantity: "ambient_c", value: 22, ...typed },
          { quantity: "power_w", value: 150, ...typed },
        ],
      });
      await setRunState(by, { runId, version, state: "done", reason: null });
    }
  };
  const mounts = of.mounts ?? 10;
  if (bridgeUnitId) {
    await mount(baselineUnitId, 1);
    for (let number = 1; number <= mounts; number += 1) await mount(bridgeUnitId, number);
    for (let number = 2; number <= mounts; number += 1) await mount(baselineUnitId, number);
  } else for (let number = 1; number <= mounts; number += 1) await mount(baselineUnitId, number);
  await calibrate("after");
  const { findings } = await endSession(by, { sessionId, at: new Date(of.at.getTime() + 8 * 3_600_000) });
  return { sessionId, findings };
}
