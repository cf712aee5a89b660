import type { BenchReading, RunRow } from "@/db/queries/bench-runs";
import type { BenchReadingView, BenchRunView } from "@/lib/contracts/bench-session";
import { runLacks } from "@/lib/domain/bench/run-lacks";

/** Handles by person id, as people are called today. */
export type Handles = ReadonlyMap<string, string>;

/** A run as the screen reads it, with what it lacks before it may be done. */
export function runView(
  run: RunRow,
  readings: readonly BenchReading[],
  positions: readonly { id: string; name: string }[],
  people: Handles,
): BenchRunView {
  const standing = readings.filter((each) => each.runId === run.id && each.supersededBy === null);
  return {
    id: run.id,
    entryId: run.entryId,
    baselineUnitId: run.baselineUnitId,
    setSpeed: run.setSpeed,
    mountNumber: run.mountNumber,
    repeatNumber: run.repeatNumber,
    ordinal: run.ordinal,
    state: run.state,
    reason: run.reason,
    version: run.version,
    by: { personId: run.byPerson, handle: people.get(run.byPerson) ?? null },
    lacks: runLacks(standing, positions),
  };
}

export function readingView(reading: BenchReading, people: Handles): BenchReadingView {
  const { takenBy, takenAt, ...rest } = reading;
  return {
    ...rest,
    takenBy: { personId: takenBy, handle: people.get(takenBy) ?? null },
    takenAt: takenAt.toISOString(),
  };
}
