import type { z } from "zod";
import { appDb } from "@/db/client/handles";
import type { Handle } from "@/db/client/connect";
import { insertReadings, readingById, readingsOfSession } from "@/db/queries/bench-runs";
import { benchVersionOf, positionsOf } from "@/db/queries/bench-sessions";
import { insertBackground, insertCalibration } from "@/db/queries/bench-checks";
import { insertHolds, liftHoldRow, holdsOfSession } from "@/db/queries/holds";
import { latestSendBack } from "@/db/queries/review-causes";
import type { SessionReading, supersede as supersedeSchema } from "@/lib/contracts/bench";
import { ExpectedError } from "@/lib/domain/expected-error";
import { note, type Asked } from "../audit/audit";
import { chartSession } from "../baselines/control-session";
import { settleSession } from "../baselines/settle-session";
import { computeSession } from "../results/compute-session";
import { returnSignedRound } from "../review/return-to-review";
import { demandBench, demandNotOwner } from "./bench-access";
import { checkValue } from "./check-reading";

const units = { calibrator_db: "dB", background_dba: "dB(A)", pressure_pa: "Pa", humidity_percent: "%" } as const;
const spans = {
  calibrator_db: [60, 130],
  background_dba: [0, 100],
  pressure_pa: [50_000, 115_000],
  humidity_percent: [0, 100],
} as const;

/** Refuses what no calibrator, quiet room or weather reads. @throws ExpectedError impossible */
export function checkSessionValue({ quantity, value }: { quantity: keyof typeof units; value: number }): void {
  const [low, high] = spans[quantity];
  if (value >= low && value <= high) return;
  throw new ExpectedError("impossible", "The figure can't be.", [
    { path: "value", message: `lies outside ${low} to ${high} ${units[quantity]}` },
  ]);
}

/**
 * Keeps a reading of the session itself. A background read while heated lasts at most 30 s, under an independent
 * thermal cut-out; the database holds to that as well.
 */
export async function addSessionReading(
  asked: Asked,
  { sessionId, reading }: { sessionId: string; reading: SessionReading },
): Promise<{ readingId: string }> {
  checkSessionValue(reading);
  if (reading.quantity === "background_dba" && reading.heated && reading.durationS > 30) {
    throw new ExpectedError(
      "malformed",
      "With the heater on and the fan stopped, at most 30 s, under a thermal cut-out.",
      [{ path: "durationS", message: "is more than 30 s with the heater on" }],
    );
  }
  return appDb().transaction(async (tx) => {
    const { person, session } = await demandBench(tx, asked, { sessionId, open: true });
    const positionId = "positionId" in reading ? reading.positionId : null;
    const bench = await benchVersionOf(tx, { benchVersionId: session.benchVersionId });
    const positions = await positionsOf(tx, { benchVersionId: session.benchVersionId });
    if (positionId && !positions.some((each) => each.id === positionId)) {
      throw new ExpectedError("malformed", "There is no such microphone position on this bench.", [
        { path: "positionId", message: "is of another bench" },
      ]);
    }
    const [readingId = ""] = await insertReadings(tx, [
      {
        sessionId,
        runId: null,
        quantity: reading.quantity,
        value: reading.value,
        unit: units[reading.quantity],
        source: "typed",
        positionId,
        phase: reading.quantity === "calibrator_db" ? reading.phase : null,
        takenBy: person.personId,
      },
    ]);
    if (reading.quantity === "calibrator_db") {
      await insertCalibration(tx, { sessionId, readingId, ...reading, calibratorLevelDb: bench.calibratorLevelDb });
    }
    if (reading.quantity === "background_dba") await insertBackground(tx, { sessionId, readingId, ...reading });
    return { readingId };
  });
}

/**
 * Supersedes one reading by another; the old one stays beside it. In a closed session only for an entry that a review
 * sent back: then the review is named as the cause and the session is computed anew.
 */
export async function supersedeReading(
  asked: Asked,
  { readingId, value, reason }: { readingId: string } & z.output<typeof supersedeSchema>,
): Promise<{ readingId: string }> {
  return appDb().transaction(async (tx) => {
    const old = await readingById(tx, { readingId });
    if (!old) throw new ExpectedError("not_found", "There is no such reading.");
    if (old.supersededBy) throw new ExpectedError("moved_on", "This reading was superseded by another already.");
    const { person, session } = await demandBench(tx, asked, { sessionId: old.sessionId });
    const cause = session.endedAt ? await latestSendBack(tx, { sessionId: session.id, runId: old.runId }) : undefined;
    if (session.endedAt && !cause) {
      throw new ExpectedError(
        "moved_on",
        "The session is closed: a reading changes after a review sent its entry back, or by a correction.",
      );
    }
    if (cause) await demandNotOwner(tx, person, cause.entryId);
    const bench = await benchVersionOf(tx, { benchVersionId: session.benchVersionId });
    if (old.quantity in { level_dba: 1, sensor_c: 1, ambient_c: 1, delta_t_k: 1, power_w: 1, speed_rpm: 1 }) {
      const others = (await readingsOfSession(tx, { sessionId: old.sessionId })).filter(
        (each) => each.runId === old.runId && each.supersededBy === null && each.id !== readingId,
      );
      checkValue({ quantity: old.quantity as "level_dba", value }, bench, others);
    }
    await changeWhatWasSigned(tx, session.roundId, reason);
    const [made = ""] = await insertReadings(tx, [
      {
        sessionId: old.sessionId,
        runId: old.runId,
        quantity: old.quantity,
        positionId: old.positionId,
        phase: old.phase,
        rotorPosition: old.rotorPosition,
        unit: old.unit,
        value,
        source: "typed",
        supersedes: readingId,
        reviewId: cause?.reviewId ?? null,
        reason,
        takenBy: person.personId,
      },
    ]);
    if (session.endedAt) {
      await computeSession(tx, session.id);
      await chartSession(tx, { sessionId: session.id, at: new Date() });
    }
    await note(tx, asked, {
      action: "reading.supersede",
      subjectKind: "reading",
      subjectId: readingId,
      before: old.value,
      after: { readingId: made, value },
    });
    return { readingId: made };
  });
}

/** A signed or scheduled round goes back to review before its readings change. @throws ExpectedError once published */
async function changeWhatWasSigned(tx: Handle, roundId: string | null, reason: string): Promise<void> {
  if (roundId === null) return;
  const state = await returnSignedRound(tx, { roundId, reason: `A reading changed: ${reason}`, at: new Date() });
  if (state === "published") {
    throw new ExpectedError("moved_on", "The round is published: a reading of it changes by a correction.");
  }
}

/** Holds a session by hand, with a reason. */
export async function holdSession(
  asked: Asked,
  { sessionId, reason, at }: { sessionId: string; reason: string; at: Date },
): Promise<void> {
  await appDb().transaction(async (tx) => {
    const { person } = await demandBench(tx, asked, { sessionId });
    await insertHolds(tx, {
      sessionId,
      findings: [{ code: "operator", reason, whatToDo: "" }],
      raisedBy: person.personId,
      at,
    });
    await note(tx, asked, { action: "session.hold", subjectKind: "session", subjectId: sessionId, after: { reason } });
  });
}

/** Lifts a hold with a note; neither the session's operator nor whoever raised it. The database holds to that as well. */
export async function liftHold(
  asked: Asked,
  { sessionId, holdId, liftNote, at }: { sessionId: string; holdId: string; liftNote: string; at: Date },
): Promise<void> {
  await appDb().transaction(async (tx) => {
    const { person, session } = await demandBench(tx, asked, { sessionId });
    const hold = (await holdsOfSession(tx, { sessionId })).find((each) => each.id === holdId);
    if (!hold) throw new ExpectedError("not_found", "There is no such hold.");
    if (session.operatorId === person.personId || hold.raisedBy === person.personId) {
      throw new ExpectedError(
        "forbidden",
        "Another person lifts this hold: not the session's operator, nor whoever raised it.",
      );
    }
    if (!(await liftHoldRow(tx, { holdId, liftedBy: person.personId, liftNote, at }))) {
      throw new ExpectedError("moved_on", "Somebody lifted this hold already.");
    }
    await settleSession(tx, { sessionId, at });
    await note(tx, asked, { action: "hold.lift", subjectKind: "hold", subjectId: holdId, after: { liftNote } });
  });
}
