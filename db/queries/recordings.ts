import type { RecordingOrder, RecordingResult } from "@/lib/domain/bench/read-recording";
import type { Handle } from "../client/connect";

export type RecordingState = "waiting" | "reading" | "read" | "refused" | "cancelled";
export interface RecordingRefusal {
  code: string;
  message: string;
  at: string | null;
}

/** What a recording is read as, by value, and which recordings of the session that came from. */
export type RecordingAsked = RecordingOrder & { heated?: boolean; calibrationId?: string; backgroundId?: string };

export interface RecordingRow {
  id: string;
  sessionId: string;
  runId: string | null;
  positionId: string;
  purpose: "run" | "background" | "calibration";
  phase: "before" | "after" | null;
  fileId: string;
  name: string;
  bytes: number;
  sha256: string;
  storageKey: string;
  /** "taken_down" for bytes that are gone. */
  fileState: string;
  asked: RecordingAsked;
  state: RecordingState;
  doneBytes: number;
  refusal: RecordingRefusal | null;
  result: RecordingResult | null;
  logFileId: string | null;
  keptAt: Date | null;
  byPerson: string;
  createdAt: Date;
  listenedBy: string | null;
  listenedAt: Date | null;
}

const columns = {
  id: "r.id",
  sessionId: "r.session_id",
  runId: "r.run_id",
  positionId: "r.position_id",
  purpose: "r.purpose",
  phase: "r.phase",
  fileId: "r.file_id",
  name: "r.name",
  bytes: "f.bytes",
  sha256: "f.sha256",
  storageKey: "f.storage_key",
  fileState: "f.state",
  asked: "r.asked",
  state: "r.state",
  doneBytes: "r.done_bytes",
  refusal: "r.refusal",
  result: "r.result",
  logFileId: "r.log_file_id",
  keptAt: "r.kept_at",
  byPerson: "r.by_person",
  createdAt: "r.created_at",
  listenedBy: "l.by_person",
  listenedAt: "l.at",
} as const;

const rows = (db: Handle) =>
  db("recording_read as r")
    .join("file as f", "f.id", "r.file_id")
    .leftJoin("recording_listened as l", "l.recording_id", "r.id");

export async function insertRecording(
  db: Handle,
  recording: Pick<
    RecordingRow,
    "sessionId" | "runId" | "positionId" | "purpose" | "phase" | "fileId" | "name" | "asked" | "byPerson"
  > & { uploadId: string },
): Promise<string> {
  const [made]: { id: string }[] = await db("recording_read")
    .insert({
      session_id: recording.sessionId,
      run_id: recording.runId,
      position_id: recording.positionId,
      purpose: recording.purpose,
      phase: recording.phase,
      upload_id: recording.uploadId,
      file_id: recording.fileId,
      name: recording.name,
      asked: JSON.stringify(recording.asked),
      by_person: recording.byPerson,
    })
    .returning("id");
  if (!made) throw new Error("no recording came back");
  return made.id;
}

/** One recording. With `lock` its row is held until the transaction ends. */
export async function recordingById(
  db: Handle,
  { recordingId, lock = false }: { recordingId: string; lock?: boolean },
): Promise<RecordingRow | undefined> {
  if (lock) await db("recording_read").where({ id: recordingId }).forUpdate().first("id");
  return rows(db).where("r.id", recordingId).first<RecordingRow | undefined>(columns);
}

/** Recordings of a session, the oldest first. */
export async function recordingsOfSession(db: Handle, { sessionId }: { sessionId: string }): Promise<RecordingRow[]> {
  return rows(db).where("r.session_id", sessionId).orderBy(["r.created_at", "r.id"]).select<RecordingRow[]>(columns);
}

/** Begins or goes on with the reading of a recording. @returns false when it was ended meanwhile */
export async function tellRecording(
  db: Handle,
  { recordingId, doneBytes }: { recordingId: string; doneBytes: number },
): Promise<boolean> {
  const told = await db("recording_read")
    .where({ id: recordingId })
    .whereIn("state", ["waiting", "reading"])
    .update({ state: "reading", done_bytes: doneBytes });
  return told > 0;
}

/** Ends the reading of a recording with what came of it. @returns false when it was ended already */
export async function endRecording(
  db: Handle,
  {
    recordingId,
    finishedAt,
    ...end
  }: { recordingId: string; finishedAt: Date } & (
    | { state: "read"; result: RecordingResult; doneBytes: number }
    | { state: "refused"; refusal: RecordingRefusal }
    | { state: "cancelled" }
  ),
): Promise<boolean> {
  const ended = await db("recording_read")
    .where({ id: recordingId })
    .whereIn("state", ["waiting", "reading"])
    .update({
      state: end.state,
      finished_at: finishedAt,
      ...(end.state === "read" && { result: JSON.stringify(end.result), done_bytes: end.doneBytes }),
      ...(end.state === "refused" && { refusal: JSON.stringify(end.refusal) }),
    });
  return ended > 0;
}

export async function keepRecordingAs(
  db: Handle,
  { recordingId, logFileId, keptAt }: { recordingId: string; logFileId: string; keptAt: Date },
): Promise<void> {
  await db("recording_read").where({ id: recordingId }).update({ log_file_id: logFileId, kept_at: keptAt });
}

/** Notes that somebody listened to a recording and heard no voices; the first such note stays. */
export async function insertListened(
  db: Handle,
  { recordingId, byPerson, at }: { recordingId: string; byPerson: string; at: Date },
): Promise<void> {
  await db("recording_listened")
    .insert({ recording_id: recordingId, by_person: byPerson, at })
    .onConflict("recording_id")
    .ignore();
}
