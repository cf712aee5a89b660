import type { Person } from "@/lib/domain/accounts/actor";
import { spinUpItems, checklistItems } from "@/lib/domain/bench/cautions";
import { moveAtBench } from "@/lib/server/bench/entry-moves";
import { addRun, setRunState } from "@/lib/server/bench/runs";
import { addSessionReading } from "@/lib/server/bench/session-readings";
import { startSession } from "@/lib/server/bench/sessions";
import { addSpecimen, recordPart } from "@/lib/server/bench/specimens";
import { speedsRpm, type BenchRoom } from "./bench-room";

export const asked = (actor: Person) => ({ actor, requestId: "test" });
export const later = (minutes: number) => new Date(Date.UTC(2026, 5, 1, 9, minutes));

const ticked = (items: object) => Object.fromEntries(Object.keys(items).map((key) => [key, true]));
export const allTicked = ticked(checklistItems);

export const passedPart = {
  massG: 92.4,
  balanceRecord: "rests anywhere on the knife edge",
  spinUpSpeedRpm: 1740,
  spinUpRecord: "60 s at each of 600, 1200 and 1740 rpm, no rise in vibration",
  cautions: ticked(spinUpItems),
  state: "passed" as const,
};

/** Prints an entry, spins every rotor of the copy up and puts it on the bench. */
export async function toTheBench(room: BenchRoom, entryId: string): Promise<string> {
  const { operator } = room;
  const rotors = room.entries.find((each) => each.entryId === entryId)?.rotors ?? 1;
  await moveAtBench(asked(operator), { entryId, from: "accepted", to: "printing", at: later(0) });
  const { specimenId } = await addSpecimen(
    asked(operator),
    { entryId, material: "PETG", colour: "", note: "" },
    later(1),
  );
  for (let rotorPosition = 1; rotorPosition <= rotors; rotorPosition += 1) {
    await recordPart(asked(operator), { specimenId, rotorPosition, at: later(2), ...passedPart });
  }
  await moveAtBench(asked(operator), { entryId, from: "printing", to: "on_the_bench", at: later(3) });
  return specimenId;
}

export async function openSession(room: BenchRoom): Promise<string> {
  const { roundId, benchVersionId, baselineUnitId, operator } = room;
  const input = { roundId, benchVersionId, baselineUnitId, checklist: allTicked };
  return (await startSession(asked(operator), input, later(5))).sessionId;
}

/** Calibrator at its nominal 94 dB and a background of 28 dB(A). */
export async function calibrate(
  room: BenchRoom,
  sessionId: string,
  phase: "before" | "after",
  value = 94,
): Promise<void> {
  const { operator, positionId } = room;
  const reading = { quantity: "calibrator_db" as const, positionId, phase, value };
  await addSessionReading(asked(operator), { sessionId, reading });
}

export async function readBackground(room: BenchRoom, sessionId: string): Promise<void> {
  const { operator, positionId } = room;
  const reading = { quantity: "background_dba" as const, positionId, value: 28, durationS: 20, heated: false };
  await addSessionReading(asked(operator), { sessionId, reading });
}

/** A mount at every set speed, each run done. Level and sensor temperature of a subject are `at(speed)`. */
export async function mount(
  room: BenchRoom,
  sessionId: string,
  entryId: string | null,
  mountNumber: number,
  at: (speedRpm: number) => { levelDba: number; sensorC: number },
): Promise<string[]> {
  const runIds: string[] = [];
  for (const setSpeed of speedsRpm) {
    const { levelDba, sensorC } = at(setSpeed);
    const typed = "typed" as const;
    const { runId, version } = await addRun(asked(room.operator), {
      ...{ sessionId, entryId, setSpeed, mountNumber, repeatNumber: 1 },
      readings: [
        { quantity: "level_dba", value: levelDba, positionId: room.positionId, source: typed },
        { quantity: "sensor_c", value: sensorC, source: typed },
        { quantity: "ambient_c", value: 22, source: typed },
        { quantity: "power_w", value: 150, source: typed },
        { quantity: "speed_rpm", value: setSpeed, rotorPosition: 1, source: typed },
      ],
    });
    await setRunState(asked(room.operator), { runId, version, state: "done", reason: null });
    runIds.push(runId);
  }
  return runIds;
}

/** Louder and cooler with speed; `less` K cooler than the baseline. */
export const toy =
  (less = 0) =>
  (speedRpm: number) => ({
    levelDba: speedRpm === 1100 ? 38 : 46,
    sensorC: (speedRpm === 1100 ? 62 : 52) - less,
  });
