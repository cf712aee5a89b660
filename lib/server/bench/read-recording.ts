import { setInterval } from "node:timers";
import { appDb } from "@/db/client/handles";
import { endRecording, recordingById, tellRecording, type RecordingRow } from "@/db/queries/recordings";
import { passesOf, type RecordingResult } from "@/lib/domain/bench/read-recording";
import { Refusal } from "@/lib/science/refusal";
import { asLocalFile } from "@/lib/services/quarantine/quarantine";
import { storage } from "@/lib/services/storage/from-env";
import { log } from "../log";
import { runThread } from "../threads/run-thread";
import type { RecordingThreadOrder } from "./read-recording-thread";

const tellEveryMs = 500;
/** Within the job's own limit of 300 s. */
const withinMs = 240_000;
const heapMaxMb = 512;

/**
 * Reads a recording that was asked for in a thread, telling the bytes gone through; one that is cancelled meanwhile ends
 * the thread. What can't be read is refused with the reader's reason. Working it twice does nothing the second time.
 */
export async function readRecordingFile(recordingId: string, now: () => Date): Promise<void> {
  const row = await recordingById(appDb(), { recordingId });
  if (!row || !(await tellRecording(appDb(), { recordingId, doneBytes: 0 }))) return;
  try {
    const { body } = await storage().get(row.storageKey);
    const result = await asLocalFile(body, (file) => readInThread(row, file));
    const doneBytes = passesOf(row.asked) * row.bytes;
    await endRecording(appDb(), { recordingId, state: "read", result, doneBytes, finishedAt: now() });
  } catch (error) {
    if (!(error instanceof Refusal)) throw error;
    const { code, message, at } = error;
    const refusal = { code, message, at: at === undefined ? null : String(at) };
    await endRecording(appDb(), { recordingId, state: "refused", refusal, finishedAt: now() });
  }
}

async function readInThread(row: RecordingRow, file: string): Promise<RecordingResult> {
  const stop = new AbortController();
  let doneBytes = 0;
  const timer = setInterval(() => {
    tellRecording(appDb(), { recordingId: row.id, doneBytes }).then(
      (goesOn) => void (goesOn || stop.abort()),
      (error: unknown) => log().warn({ err: error, recordingId: row.id }, "progress of a recording"),
    );
  }, tellEveryMs);
  const order: RecordingThreadOrder = { file, order: row.asked };
  const onProgress = (done: number): void => void (doneBytes = done);
  try {
    const control = { signal: stop.signal, withinMs, heapMaxMb, onProgress };
    // The thread is ours and runs the same code: what it gives is what the type says.
    return (await runThread("lib/server/bench/read-recording-thread.ts", order, control)) as RecordingResult;
  } catch (error) {
    if (error instanceof Refusal) throw error;
    // A file that breaks the reader would break it again: its sender is told, and the fault is ours to find in the log.
    log().error({ err: error, recordingId: row.id }, "the reader broke on a recording");
    throw new Refusal("failed", "The reader stopped on this recording; what it is about it we don't know yet.");
  } finally {
    clearInterval(timer);
  }
}
