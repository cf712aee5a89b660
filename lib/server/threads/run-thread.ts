import path from "node:path";
import { pathToFileURL } from "node:url";
import { Worker } from "node:worker_threads";
import { Refusal } from "@/lib/science/refusal";
import { hearThread } from "./hear-thread";

/** What a thread says: how far it is, what it found, or why it can't. */
export type ThreadSaid =
  | { kind: "progress"; done: number }
  | { kind: "done"; result: unknown }
  | { kind: "refused"; code: string; message: string; at: string | number | undefined };

export interface ThreadControl {
  /** Told now and then. */
  onProgress?: (done: number) => void;
  /** Ends the thread at once when it is aborted. */
  signal?: AbortSignal;
  withinMs: number;
  /** Heap in MB; typed arrays lie outside it. */
  heapMaxMb: number;
}

/** So many threads run at once in a process; further ones wait for their turn. */
const mostAtOnce = 2;
let running = 0;
const waiting: (() => void)[] = [];

/**
 * Runs a module of the house in a thread of its own, in bounded time and memory; the process goes on whatever the input
 * does to the thread. Its result comes as plain data, for the caller to check.
 *
 * @param file the module's path from the root of the house; it works on `workerData` and answers by ThreadSaid
 * @throws Refusal with the module's reason; codes "cancelled", "time-limit" and "memory-limit" where it was ended
 */
export async function runThread(file: string, order: unknown, control: ThreadControl): Promise<unknown> {
  if (running < mostAtOnce) running += 1;
  else await new Promise<void>((turn) => waiting.push(turn));
  try {
    return await start(file, order, control);
  } finally {
    // The place is handed on, so that nobody who comes in between takes it.
    const next = waiting.shift();
    if (next) next();
    else running -= 1;
  }
}

/** A thread doesn't inherit what lets its process run TypeScript, so it sets that up itself. */
function startScript(file: string): string {
  const address = pathToFileURL(path.join(/* turbopackIgnore: true */ process.cwd(), file)).href;
  return `import("tsx/esm/api").then(({ register }) => { register(); return import(${JSON.stringify(address)}); });`;
}

/** Starts a module of the house in a thread; whoever starts it ends it. */
export function startThread(file: string, order: unknown, heapMaxMb: number): Worker {
  return new Worker(startScript(file), {
    eval: true,
    workerData: order,
    execArgv: [],
    resourceLimits: { maxOldGenerationSizeMb: heapMaxMb },
  });
}

function start(file: string, order: unknown, control: ThreadControl): Promise<unknown> {
  const { onProgress, signal, withinMs, heapMaxMb } = control;
  const thread = startThread(file, order, heapMaxMb);
  return hearThread<ThreadSaid, unknown>(
    thread,
    { signal, withinMs, what: "file" },
    {
      onSaid(said, { resolve, reject }) {
        if (said.kind === "progress") onProgress?.(said.done);
        else if (said.kind === "refused") reject(new Refusal(said.code, said.message, said.at));
        else resolve(said.result);
      },
    },
  );
}
