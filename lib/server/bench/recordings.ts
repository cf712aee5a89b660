import { appDb } from "@/db/client/handles";
import type { Handle } from "@/db/client/connect";
import { sqlExecutor } from "@/db/client/executor";
import { benchVersionOf, positionsOf, protocolOf, type SessionHead } from "@/db/queries/bench-sessions";
import {
  endRecording,
  insertRecording,
  recordingById,
  recordingsOfSession,
  type RecordingAsked,
  type RecordingRow,
} from "@/db/queries/recordings";
import { rotorsOfRound } from "@/db/queries/bench-rotors";
import { handlesOf } from "@/db/queries/people";
import { uploadBy } from "@/db/queries/uploads";
import {
  benchRecording,
  type BenchRecording,
  type BenchRecordings,
  type NewRecording,
} from "@/lib/contracts/bench-recordings";
import type { Actor, Person } from "@/lib/domain/accounts/actor";
import { passesOf, type RecordingCalibration } from "@/lib/domain/bench/read-recording";
import { ExpectedError } from "@/lib/domain/expected-error";
import { jobs } from "@/lib/services/jobs/from-env";
import type { Asked } from "../audit/audit";
import { log } from "../log";
import { demand } from "../permission";
import { demandBench } from "./bench-access";
import { demandKept, demandRun } from "./runs";

/**
 * Asks for a recording to be read: a WAV that this person sent for the session and that is all there. It is read by a
 * job; nothing counts before it is kept.
 * @throws ExpectedError moved_on while the file isn't read, for a closed session, a discarded run or another recording
 * that isn't kept; malformed for another's position, channel or calibration; not_found, forbidden
 */
export async function askRecording(
  asked: Asked,
  { sessionId, ...input }: { sessionId: string } & NewRecording,
): Promise<{ recordingId: string }> {
  const queue = await jobs((error) => log().error({ err: error }, "job queue"));
  return appDb().transaction(async (tx) => {
    const { person, session } = await demandBench(tx, asked, { sessionId, open: true });
    if (input.purpose === "run") {
      const { run } = await demandRun(tx, asked, input.runId);
      if (run.sessionId !== sessionId) throw new ExpectedError("not_found", "There is no such run in this session.");
      demandKept(run);
    }
    await demandPosition(tx, session, input.positionId);
    const { fileId, name } = await demandFile(tx, person, sessionId, input.uploadId);
    const recordingId = await insertRecording(tx, {
      ...{ sessionId, positionId: input.positionId, purpose: input.purpose, fileId, name, uploadId: input.uploadId },
      runId: input.purpose === "run" ? input.runId : null,
      phase: input.purpose === "calibration" ? input.phase : null,
      asked: await orderOf(tx, session, input),
      byPerson: person.personId,
    });
    await queue.send("recording-read", { recordingId }, { within: sqlExecutor(tx), onceBy: recordingId });
    return { recordingId };
  });
}

async function demandPosition(tx: Handle, session: SessionHead, positionId: string): Promise<void> {
  const positions = await positionsOf(tx, { benchVersionId: session.benchVersionId });
  if (positions.some((each) => each.id === positionId)) return;
  throw new ExpectedError("malformed", "There is no such microphone position on this bench.", [
    { path: "positionId", message: "is of another bench" },
  ]);
}

async function demandFile(
  tx: Handle,
  person: Person,
  sessionId: string,
  uploadId: string,
): Promise<{ fileId: string; name: string }> {
  const upload = await uploadBy(tx, { uploadId });
  const own = upload?.personId === person.personId && upload.purpose === "recording" && upload.subjectId === sessionId;
  if (!upload || !own) throw new ExpectedError("not_found", "There is no such recording of yours for this session.");
  if (upload.state === "refused") {
    const reason = upload.reason ?? "it was refused";
    throw new ExpectedError("wrong_kind", `The file was not taken: ${reason}`, [{ path: "uploadId", message: reason }]);
  }
  if (upload.state !== "read" || upload.fileId === null) {
    throw new ExpectedError("moved_on", "The file isn't all there and looked at yet. Ask again in a moment.");
  }
  return { fileId: upload.fileId, name: upload.name };
}

async function orderOf(tx: Handle, session: SessionHead, input: NewRecording): Promise<RecordingAsked> {
  const { channel } = input;
  const from = (given: Parameters<typeof calibrationOf>[2], path: string) => calibrationOf(tx, session.id, given, path);
  if (input.purpose === "calibration") {
    const { levelDb, against, phase } = input;
    if (phase === "after" && against === null) {
      throw new ExpectedError("malformed", "A drift needs what the calibrator read before the series.", [
        { path: "against", message: "is missing: a kept calibrator recording from before, or a full-scale level" },
      ]);
    }
    if (against === null) {
      await demandOwnCalibrator(tx, session, levelDb);
      return { purpose: "calibration", channel, levelDb, against: null };
    }
    const { calibration, ...origin } = await from(against, "against");
    return { purpose: "calibration", channel, levelDb, against: calibration, ...origin };
  }
  const { calibration, ...origin } = await from(input.calibration, "calibration");
  if (input.purpose === "background") {
    return { purpose: "background", channel, calibration, heated: input.heated, ...origin };
  }
  const { backgroundGrade } = await protocolOf(tx, { protocolVersionId: session.protocolVersionId });
  const background =
    input.backgroundId === null ? null : await keptOf(tx, session.id, input.backgroundId, "background", "backgroundId");
  const { rotation, struts, ...turning } = input.rotors ?? { blades: [], rpm: [] };
  if (input.rotors && turning.blades.length !== turning.rpm.length) {
    throw new ExpectedError("malformed", "Speeds are given one for each blade count.", [
      { path: "rotors.rpm", message: `holds ${turning.rpm.length} speeds for ${turning.blades.length} rotors` },
    ]);
  }
  return {
    purpose: "run",
    channel,
    calibration,
    background: background?.result?.given.background ?? null,
    grade: backgroundGrade,
    rotors: input.rotors && { ...turning, ...(rotation && { rotation }), ...(struts !== undefined && { struts }) },
    ...origin,
    ...(background && { backgroundId: background.id }),
  };
}

/** The first calibrator recording tells itself, so its level has to be the bench's calibrator's. */
async function demandOwnCalibrator(tx: Handle, session: SessionHead, levelDb: number): Promise<void> {
  const { calibratorLevelDb } = await benchVersionOf(tx, { benchVersionId: session.benchVersionId });
  if (Math.abs(levelDb - calibratorLevelDb) <= 1) return;
  throw new ExpectedError("malformed", "The level isn't that of the bench's calibrator.", [
    { path: "levelDb", message: `is more than 1 dB from the calibrator's ${calibratorLevelDb} dB` },
  ]);
}

async function calibrationOf(
  tx: Handle,
  sessionId: string,
  given: { recordingId: string } | { fullScaleDb: number },
  path: string,
): Promise<{ calibration: RecordingCalibration; calibrationId?: string }> {
  if ("fullScaleDb" in given) return { calibration: given };
  const row = await keptOf(tx, sessionId, given.recordingId, "calibration", path);
  const read = row.result?.given.calibrator;
  if (!read) throw new Error(`The calibration ${row.id} gives no level.`);
  return { calibration: { read }, calibrationId: row.id };
}

async function keptOf(
  tx: Handle,
  sessionId: string,
  recordingId: string,
  purpose: RecordingRow["purpose"],
  path: string,
): Promise<RecordingRow> {
  const row = await recordingById(tx, { recordingId });
  const fault = (message: string) =>
    new ExpectedError("malformed", `The ${purpose} recording can't be used.`, [{ path, message }]);
  if (!row || row.sessionId !== sessionId || row.purpose !== purpose) {
    throw fault(`is no ${purpose} recording of this session`);
  }
  if (row.keptAt === null) throw fault("is not kept yet");
  return row;
}

/** A recording, if the person may see its session's figures. @throws ExpectedError not_found, forbidden */
export async function demandRecording(
  db: Handle,
  asked: Asked,
  { recordingId, lock = false, open = false }: { recordingId: string; lock?: boolean; open?: boolean },
): Promise<{ row: RecordingRow; session: SessionHead; person: Person }> {
  demand(asked.actor, "bench.read");
  const row = await recordingById(db, { recordingId, lock });
  if (!row) throw new ExpectedError("not_found", "There is no such recording.");
  const { session, person } = await demandBench(db, asked, { sessionId: row.sessionId, open });
  return { row, session, person };
}

export async function readRecording(actor: Actor, { recordingId }: { recordingId: string }): Promise<BenchRecording> {
  const { row } = await demandRecording(appDb(), { actor, requestId: null }, { recordingId });
  const [view] = await viewsOf([row]);
  if (!view) throw new Error("no view of a recording");
  return view;
}

/** Recordings of a session, the oldest first, and what tones are predicted from: the rotors of its round's entries. */
export async function readRecordings(actor: Actor, { sessionId }: { sessionId: string }): Promise<BenchRecordings> {
  const { session } = await demandBench(appDb(), { actor, requestId: null }, { sessionId });
  const { roundId } = session;
  const [items, subjects] = await Promise.all([
    recordingsOfSession(appDb(), { sessionId }).then(viewsOf),
    roundId === null ? [] : rotorsOfRound(appDb(), { roundId }),
  ]);
  return { items, subjects };
}

async function viewsOf(rows: readonly RecordingRow[]): Promise<BenchRecording[]> {
  const people = await handlesOf(appDb(), { personIds: rows.flatMap((row) => row.listenedBy ?? []) });
  return rows.map((row) =>
    benchRecording.parse({
      ...{ id: row.id, purpose: row.purpose, runId: row.runId, positionId: row.positionId, phase: row.phase },
      ...{ name: row.name, bytes: row.bytes, sha256: row.sha256, state: row.state, refusal: row.refusal },
      channel: row.asked.channel,
      doneBytes: row.doneBytes,
      ofBytes: passesOf(row.asked) * row.bytes,
      report: row.result?.report ?? null,
      calibrator: row.result?.calibrator ?? null,
      given: row.result?.given ?? null,
      logFileId: row.logFileId,
      keptAt: row.keptAt?.toISOString() ?? null,
      listenedBy: row.listenedBy && { personId: row.listenedBy, handle: people.get(row.listenedBy) ?? null },
      listenedAt: row.listenedAt?.toISOString() ?? null,
      createdAt: row.createdAt.toISOString(),
    }),
  );
}

/** Breaks the reading of a recording off. @throws ExpectedError moved_on when it is through */
export async function cancelRecording(
  asked: Asked,
  { recordingId, now }: { recordingId: string; now: Date },
): Promise<void> {
  await demandRecording(appDb(), asked, { recordingId });
  const ended = await endRecording(appDb(), { recordingId, state: "cancelled", finishedAt: now });
  if (!ended) throw new ExpectedError("moved_on", "The reading is through; there is nothing left to cancel.");
}
