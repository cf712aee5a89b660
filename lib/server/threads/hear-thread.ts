import type { Worker } from "node:worker_threads";
import { Refusal } from "@/lib/science/refusal";

export interface ThreadBounds {
  /** Ends the thread at once when it is aborted. */
  signal?: AbortSignal | undefined;
  withinMs: number;
  /** What is read, as in "The model needs more memory". */
  what: string;
}

export interface Hearing<Said, Found> {
  /** Hears what the thread says, and settles once it has heard enough. */
  onSaid(said: Said, settle: { resolve: (found: Found) => void; reject: (error: unknown) => void }): void;
  /** What stands already where the thread fails or is ended for time or memory; undefined where nothing does. */
  rescued?(): Found | undefined;
}

/**
 * Hears a thread until it has said enough, fails, or passes its bounds, and ends it then.
 *
 * @throws Refusal with codes "cancelled", "time-limit" and "memory-limit" where it was ended
 */
export function hearThread<Said, Found>(
  thread: Worker,
  { signal, withinMs, what }: ThreadBounds,
  { onSaid, rescued }: Hearing<Said, Found>,
): Promise<Found> {
  return new Promise<Found>((resolve, reject) => {
    const fail = (error: unknown): void => {
      const found = rescued?.();
      if (found === undefined) reject(error);
      else resolve(found);
    };
    const cancel = (): void => reject(new Refusal("cancelled", "Reading was cancelled."));
    const timer = setTimeout(() => fail(tooSlow(withinMs)), withinMs);
    signal?.addEventListener("abort", cancel, { once: true });
    if (signal?.aborted) cancel();
    thread.on("message", (said: Said) => onSaid(said, { resolve, reject }));
    thread.on("error", (error) => fail(outOfMemory(error) ? tooBig(what) : error));
    thread.on("exit", (code) => fail(new Error(`The reader's thread ended early (${code}).`)));
    thread.once("exit", () => {
      clearTimeout(timer);
      signal?.removeEventListener("abort", cancel);
    });
  }).finally(() => void thread.terminate());
}

const tooSlow = (withinMs: number): Refusal =>
  new Refusal("time-limit", `Reading took longer than ${Math.round(withinMs / 1000)} s and was stopped.`);
const tooBig = (what: string): Refusal =>
  new Refusal("memory-limit", `The ${what} needs more memory than one reading may take.`);
const outOfMemory = (error: Error): boolean =>
  ("code" in error && error.code === "ERR_WORKER_OUT_OF_MEMORY") || /array buffer allocation/i.test(error.message);
