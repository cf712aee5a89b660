import { parentPort, workerData } from "node:worker_threads";
import { Refusal } from "@/lib/science/refusal";
import type { ThreadSaid } from "./run-thread";

const progressEveryMs = 250;
const say = (said: ThreadSaid): void => parentPort?.postMessage(said);

/** For a module that runs in a thread: works on the thread's order and tells the process what came of it. */
export function answerFromThread(work: (order: unknown, onProgress: (done: number) => void) => Promise<unknown>): void {
  let told = performance.now();
  const onProgress = (done: number): void => {
    if (performance.now() - told < progressEveryMs) return;
    told = performance.now();
    say({ kind: "progress", done });
  };
  work(workerData, onProgress).then(
    (result) => say({ kind: "done", result }),
    (error: unknown) => {
      if (!(error instanceof Refusal)) throw error;
      say({ kind: "refused", code: error.code, message: error.message, at: error.at });
    },
  );
}
