import { createHash } from "node:crypto";
import { createReadStream } from "node:fs";
import { mkdtemp, open, rm } from "node:fs/promises";
import { tmpdir } from "node:os";
import path from "node:path";
import type { Readable } from "node:stream";
import { setImmediate as nextTurn } from "node:timers/promises";
import { logBytesMax } from "@/lib/contracts/bench-logs";
import { ExpectedError } from "@/lib/domain/expected-error";
import type { LogChoice } from "@/lib/science/logs/choice";
import { LogReader, type ReadLog } from "@/lib/science/logs/log-reader";
import { Refusal } from "@/lib/science/refusal";

export interface SpooledLog {
  sha256: string;
  bytes: number;
  log: ReadLog;
  /** The bytes as they were received. */
  stream(): Readable;
}

export const tooLarge = () => new ExpectedError("too_large", "A log may have 64 MB. Cut it to the record of this run.");

/** Pieces this long are read at once; between them other requests have their turn. */
const pieceBytes = 1 << 16;

/**
 * Takes a log in as it comes: on disk as received, hashed, and read row by row in bounded memory. The copy on disk is
 * gone when `work` is done.
 * @throws ExpectedError too_large beyond 64 MB; malformed for what is no log, or a column that it doesn't have
 */
export async function spoolLog<T>(
  body: ReadableStream<Uint8Array> | null,
  choice: LogChoice,
  work: (spooled: SpooledLog) => Promise<T>,
): Promise<T> {
  const folder = await mkdtemp(path.join(tmpdir(), "fanfold-log-"));
  try {
    const file = path.join(folder, "as-received");
    const reader = new LogReader(choice);
    const taken = await takeIn(body, file, (piece) => reader.push(piece));
    const log = reader.finish();
    return await work({ ...taken, log, stream: () => createReadStream(file) });
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
  read: (piece: Uint8Array) => void,
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
      for (let from = 0; from < chunk.byteLength; from += pieceBytes) {
        read(chunk.subarray(from, from + pieceBytes));
        await nextTurn();
      }
    }
  } finally {
    await handle.close();
  }
  return { sha256: hash.digest("hex"), bytes };
}

async function* chunksOf(body: ReadableStream<Uint8Array> | null): AsyncGenerator<Uint8Array> {
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
