import { createHash } from "node:crypto";
import { createReadStream } from "node:fs";
import { mkdtemp, open, rm } from "node:fs/promises";
import { tmpdir } from "node:os";
import path from "node:path";
import type { Readable } from "node:stream";
import { logBytesMax } from "@/lib/contracts/bench-logs";
import { ExpectedError } from "@/lib/domain/expected-error";
import type { FoundLog, LogOrder } from "@/lib/domain/bench/read-log";
import { Refusal } from "@/lib/science/refusal";
import { runThread } from "../threads/run-thread";
import type { LogThreadOrder } from "./read-log-thread";

export interface SpooledLog {
  sha256: string;
  bytes: number;
  found: FoundLog;
  /** The bytes as they were received. */
  stream(): Readable;
}

export const tooLarge = () => new ExpectedError("too_large", "A log may have 64 MB. Cut it to the record of this run.");

const limits = { withinMs: 120_000, heapMaxMb: 512 };

/**
 * Takes a log in as it comes, on disk as received and hashed, and reads it in a thread, so that no row and no analysis
 * is worked on a request's own thread. The copy on disk is gone when `work` is done.
 * @throws ExpectedError too_large beyond 64 MB; malformed for what is no log, or a column that it doesn't have
 */
export async function spoolLog<T>(
  body: ReadableStream<Uint8Array> | null,
  order: LogOrder,
  work: (spooled: SpooledLog) => Promise<T>,
): Promise<T> {
  const folder = await mkdtemp(path.join(tmpdir(), "fanfold-log-"));
  try {
    const file = path.join(folder, "as-received");
    const taken = await takeIn(body, file);
    const given: LogThreadOrder = { file, order };
    // The thread is ours and runs the same code: what it gives is what the type says.
    const found = (await runThread("lib/server/bench/read-log-thread.ts", given, limits)) as FoundLog;
    return await work({ ...taken, found, stream: () => createReadStream(file) });
  } catch (error) {
    if (!(error instanceof Refusal)) throw error;
    const at = typeof error.at === "number" ? ` (line ${error.at})` : "";
    const field = typeof error.at === "string" ? error.at : "body";
    const detail = `The log can't be read${at}: ${error.message}.`;
    throw new ExpectedError("malformed", detail, [{ path: field, message: error.message }]);
  } finally {
    await rm(folder, { recursive: true, force: true });
  }
}

async function takeIn(
  body: ReadableStream<Uint8Array> | null,
  file: string,
): Promise<{ sha256: string; bytes: number }> {
  const hash = createHash("sha256");
  const handle = await open(file, "wx", 0o600);
  let bytes = 0;
  try {
    for await (const chunk of chunksOf(body)) {
      bytes += chunk.byteLength;
      if (bytes > logBytesMax) throw tooLarge();
      hash.update(chunk);
      await handle.writeFile(chunk);
    }
  } finally {
    await handle.close();
  }
  return { sha256: hash.digest("hex"), bytes };
}

/** A request's body as it comes; what is left unread is let go. */
export async function* chunksOf(body: ReadableStream<Uint8Array> | null): AsyncGenerator<Uint8Array> {
  if (!body) return;
  const reader = body.getReader();
  try {
    for (;;) {
      const { done, value } = await reader.read();
      if (done) return;
      yield value;
    }
  } finally {
    await reader.cancel().catch(() => undefined);
  }
}
