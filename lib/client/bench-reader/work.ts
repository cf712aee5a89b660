import { passesOf, readBenchRecording } from "@/lib/domain/bench/read-recording";
import { readBenchLog } from "@/lib/domain/bench/read-log";
import { Refusal } from "@/lib/science/refusal";
import type { BenchAnswer, BenchRequest } from "./messages";

const pieceBytes = 1 << 20;
const progressEveryMs = 80;

/** A file of the browser in pieces, each time from its start; memory doesn't grow with it. */
function blobPieces(file: Blob): () => AsyncGenerator<Uint8Array> {
  return async function* pieces() {
    for (let from = 0; from < file.size; from += pieceBytes) {
      yield new Uint8Array(await file.slice(from, from + pieceBytes).arrayBuffer());
    }
  };
}

/** Reads one file by the code that server and command line run, and answers with what it says or why it can't be read. */
export async function workBenchRequest(request: BenchRequest, answer: (said: BenchAnswer) => void): Promise<void> {
  const { job, file } = request;
  const of = request.kind === "recording" ? passesOf(request.order) * file.size : file.size;
  let told = performance.now();
  const onProgress = (done: number): void => {
    if (performance.now() - told < progressEveryMs) return;
    told = performance.now();
    answer({ kind: "progress", job, done, of });
  };
  try {
    const pieces = blobPieces(file);
    if (request.kind === "recording") {
      answer({ kind: "recording", job, result: await readBenchRecording(pieces, request.order, onProgress) });
    } else {
      answer({ kind: "log", job, found: await readBenchLog(pieces(), request.order, onProgress) });
    }
  } catch (error) {
    if (error instanceof Refusal) {
      const { code, message, at } = error;
      answer({ kind: "refused", job, code, message, at: at === undefined ? null : String(at) });
      return;
    }
    const message = `The reader stopped: ${error instanceof Error ? error.message : String(error)}`;
    answer({ kind: "refused", job, code: "failed", message, at: null });
  }
}
