import { createHash } from "node:crypto";
import type { Knex } from "knex";
import { changeUpload, fileOfContent, insertUpload } from "@/db/queries/uploads";
import { newRecording } from "@/lib/contracts/bench-recordings";
import type { Person } from "@/lib/domain/accounts/actor";
import { askRecording } from "@/lib/server/bench/recordings";
import { readRecordingFile } from "@/lib/server/bench/read-recording";
import { storage } from "@/lib/services/storage/from-env";
import { later } from "./bench-steps";

/** A recording whose bytes are all there, as the upload leaves them. @returns the upload's id */
export async function sentRecording(db: Knex, by: Person, sessionId: string, bytes: Uint8Array): Promise<string> {
  const sha256 = createHash("sha256").update(bytes).digest("hex");
  const storageKey = `content/${sha256.slice(0, 2)}/${sha256}`;
  await storage().put(storageKey, bytes, bytes.length);
  const { personId } = by;
  const kept = { sha256, bytes: bytes.length, kind: "wav", storageKey, receivedFrom: personId };
  const fileId = await fileOfContent(db, kept);
  const sent = { personId, purpose: "recording", subjectId: sessionId, name: "run.wav", bytes: bytes.length } as const;
  const uploadId = await insertUpload(db, { ...sent, quarantineKey: `${sha256}${Math.random()}` });
  await changeUpload(db, { uploadId, state: "read", fileId, finishedAt: later(6) });
  return uploadId;
}

/** Sends a recording, asks for it and has it read, as the job does. @returns its id */
export async function readAsJob(
  db: Knex,
  by: Person,
  sessionId: string,
  bytes: Uint8Array,
  input: Readonly<Record<string, unknown>>,
): Promise<string> {
  const uploadId = await sentRecording(db, by, sessionId, bytes);
  const order = newRecording.parse({ ...input, uploadId });
  const { recordingId } = await askRecording({ actor: by, requestId: "test" }, { sessionId, ...order });
  await readRecordingFile(recordingId, () => later(7));
  return recordingId;
}
