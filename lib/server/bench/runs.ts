import type { z } from "zod";
import { appDb } from "@/db/client/handles";
import type { Handle } from "@/db/client/connect";
import { benchEntries } from "@/db/queries/bench-entries";
import {
  changeRun,
  insertReadings,
  insertRun,
  readingsOfSession,
  runById,
  runsOfSession,
  type BenchReading,
  type RunRow,
} from "@/db/queries/bench-runs";
import { benchVersionOf, positionsOf, protocolOf, type SessionHead } from "@/db/queries/bench-sessions";
import { runQuantities, type NewRun, type ReadingInput, type runReadings, type runState } from "@/lib/contracts/bench";
import { runLacks } from "@/lib/domain/bench/run-lacks";
import type { Person } from "@/lib/domain/accounts/actor";
import { ExpectedError } from "@/lib/domain/expected-error";
import { note, type Asked } from "../audit/audit";
import { demandBench, demandNotOwner } from "./bench-access";
import { checkPlaces, checkReadings, checkSetSpeed, checkTwice, type GivenReading } from "./check-reading";

/** Readings of a run that no other supersedes. */
export async function standingOfRun(tx: Handle, sessionId: string, runId: string): Promise<BenchReading[]> {
  const readings = await readingsOfSession(tx, { sessionId });
  return readings.filter((each) => each.runId === runId && each.supersededBy === null);
}

/**
 * Refuses readings of a run, whatever they came from, that say no place of the bench, are there already, or can't be.
 * @param superseded the reading that one of them stands for from now on
 * @throws ExpectedError malformed, already_there, impossible
 */
export async function checkRunReadings(
  tx: Handle,
  {
    session,
    runId,
    readings,
    superseded,
  }: { session: SessionHead; runId: string; readings: readonly GivenReading[]; superseded?: string },
): Promise<void> {
  const bench = await benchVersionOf(tx, { benchVersionId: session.benchVersionId });
  const positions = await positionsOf(tx, { benchVersionId: session.benchVersionId });
  const standing = (await standingOfRun(tx, session.id, runId)).filter((each) => each.id !== superseded);
  checkPlaces(
    readings,
    positions.map((each) => each.id),
  );
  checkTwice(readings, standing);
  checkReadings(readings, bench, standing);
}

/** Readings as they are stored: a speed goes to the run's rotor, ambient and power to the run. */
async function storeReadings(
  tx: Handle,
  {
    session,
    runId,
    person,
    readings,
  }: { session: SessionHead; runId: string; person: Person; readings: readonly ReadingInput[] },
): Promise<string[]> {
  await checkRunReadings(tx, { session, runId, readings });
  return insertReadings(
    tx,
    readings.map((each) => ({
      sessionId: session.id,
      runId,
      quantity: each.quantity,
      value: each.value,
      unit: runQuantities[each.quantity],
      source: each.source,
      positionId: each.quantity === "level_dba" ? (each.positionId ?? null) : null,
      rotorPosition: each.quantity === "speed_rpm" ? (each.rotorPosition ?? null) : null,
      takenBy: person.personId,
    })),
  );
}

/**
 * Adds a run to an open session, with what was read so far. The baseline's when no entry is named; else of the entry's
 * newest specimen that passed spin-up.
 * @throws ExpectedError moved_on, already_there (that mount at that set speed exists), impossible, malformed, forbidden
 */
export async function addRun(
  asked: Asked,
  { sessionId, ...input }: { sessionId: string } & NewRun,
): Promise<{ runId: string; version: number; readingIds: string[] }> {
  return appDb().transaction(async (tx) => {
    const { person, session } = await demandBench(tx, asked, { sessionId, lock: true, open: true });
    await demandNotOwner(tx, person, input.entryId);
    checkSetSpeed(input.setSpeed, await protocolOf(tx, { protocolVersionId: session.protocolVersionId }));
    const entry = input.entryId
      ? (await benchEntries(tx, { roundId: session.roundId ?? "" })).find((each) => each.entryId === input.entryId)
      : undefined;
    if (input.entryId && !entry) throw new ExpectedError("malformed", "The entry is not of this session's round.");
    if (entry && entry.state !== "on_the_bench") {
      throw new ExpectedError("moved_on", `The entry is ${entry.state.replaceAll("_", " ")}, not on the bench.`);
    }
    if (entry && !entry.specimenId)
      throw new ExpectedError("moved_on", "No specimen of this entry has passed its spin-up.");
    const unitId = input.baselineUnitId ?? session.baselineUnitId;
    if (unitId !== session.baselineUnitId && unitId !== session.bridgeUnitId)
      throw new ExpectedError("malformed", "This session doesn't run that baseline unit.", [
        { path: "baselineUnitId", message: "is no unit of this session" },
      ]);
    const subjectId = entry ? entry.specimenId : unitId;
    const there = (await runsOfSession(tx, { sessionId })).find(
      (run) =>
        (run.specimenId ?? run.baselineUnitId) === subjectId &&
        run.state !== "discarded" &&
        run.setSpeed === input.setSpeed &&
        run.mountNumber === input.mountNumber &&
        run.repeatNumber === input.repeatNumber,
    );
    if (there) {
      throw new ExpectedError("already_there", `Run ${there.ordinal} is that mount at that set speed already.`, [
        { path: "mountNumber", message: `is run ${there.ordinal}'s` },
      ]);
    }
    const runId = await insertRun(tx, {
      sessionId,
      entryId: entry?.entryId ?? null,
      specimenId: entry?.specimenId ?? null,
      baselineUnitId: entry ? null : unitId,
      setSpeed: input.setSpeed,
      mountNumber: input.mountNumber,
      repeatNumber: input.repeatNumber,
      byPerson: person.personId,
    });
    const readingIds = await storeReadings(tx, { session, runId, person, readings: input.readings });
    return { runId, version: 1, readingIds };
  });
}

/** The run, if the person may work it and its session is open. @throws ExpectedError not_found, forbidden, moved_on */
export async function demandRun(
  tx: Handle,
  asked: Asked,
  runId: string,
): Promise<{ run: RunRow; session: SessionHead; person: Person }> {
  const run = await runById(tx, { runId });
  if (!run) throw new ExpectedError("not_found", "There is no such run.");
  const { session, person } = await demandBench(tx, asked, { sessionId: run.sessionId, open: true });
  await demandNotOwner(tx, person, run.entryId);
  return { run, session, person };
}

export const movedOn = "Somebody else changed this run in between. Look at it again; your typing is kept.";

/** @throws ExpectedError moved_on for a run that was discarded */
export function demandKept(run: RunRow): void {
  if (run.state !== "discarded") return;
  throw new ExpectedError("moved_on", "This run was discarded: it takes no more readings. Add the run again.");
}

/** Adds readings to a run of an open session, if nobody changed the run in between. */
export async function addRunReadings(
  asked: Asked,
  { runId, version, readings }: { runId: string } & z.output<typeof runReadings>,
): Promise<{ version: number; readingIds: string[] }> {
  return appDb().transaction(async (tx) => {
    const { session, person, run } = await demandRun(tx, asked, runId);
    demandKept(run);
    if (!(await changeRun(tx, { runId, version }))) throw new ExpectedError("moved_on", movedOn);
    return { version: version + 1, readingIds: await storeReadings(tx, { session, runId, person, readings }) };
  });
}

/** @throws ExpectedError malformed while a run lacks a reading that its figures need */
async function demandWhole(tx: Handle, session: SessionHead, runId: string): Promise<void> {
  const protocol = await protocolOf(tx, { protocolVersionId: session.protocolVersionId });
  const positions = await positionsOf(tx, { benchVersionId: session.benchVersionId });
  const standing = await standingOfRun(tx, session.id, runId);
  const lacks = runLacks(
    standing,
    positions.filter(({ name }) => protocol.positions.includes(name)),
  );
  if (lacks.length === 0) return;
  throw new ExpectedError("malformed", `The run isn't done: it lacks ${lacks.join(", ")}.`, [
    { path: "state", message: `lacks ${lacks.join(", ")}` },
  ]);
}

/** Says that a run is done, held, discarded (each but done with a reason) or open again. */
export async function setRunState(
  asked: Asked,
  { runId, version, state, reason }: { runId: string } & z.output<typeof runState>,
): Promise<{ version: number }> {
  if ((state === "held" || state === "discarded") && !reason) {
    throw new ExpectedError("malformed", `A run is ${state} with a reason.`, [
      { path: "reason", message: "is missing" },
    ]);
  }
  return appDb().transaction(async (tx) => {
    const { run, session } = await demandRun(tx, asked, runId);
    if (state === "done") await demandWhole(tx, session, runId);
    if (!(await changeRun(tx, { runId, version, state, reason: reason ?? null })))
      throw new ExpectedError("moved_on", movedOn);
    if (state === "held" || state === "discarded") {
      await note(tx, asked, {
        action: `run.${state}`,
        subjectKind: "run",
        subjectId: runId,
        before: run.state,
        after: { state, reason },
      });
    }
    return { version: version + 1 };
  });
}
