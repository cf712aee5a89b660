import type { Worker } from "node:worker_threads";
import type { StudyQuestion } from "@/lib/contracts/study-question";
import { startThread } from "../threads/run-thread";
import type { computeStudy } from "./compute-study";
import type { StudyOrder, StudySaid } from "./study-thread";

type Computed = Awaited<ReturnType<typeof computeStudy>>;
interface Waiting {
  resolve: (found: Computed) => void;
  reject: (error: Error) => void;
}

/** Entries and fit of a study over some hundreds of thousands of entries. */
const heapMaxMb = 2_048;

/** Kept on the global object: the development server loads modules anew at every change. */
const kept = globalThis as typeof globalThis & { fanfoldStudyThread?: StudyThread };

interface StudyThread {
  thread: Worker;
  waiting: Map<number, Waiting>;
  asked: number;
}

function open(): StudyThread {
  const opened: StudyThread = {
    thread: startThread("lib/server/study/study-thread.ts", undefined, heapMaxMb),
    waiting: new Map(),
    asked: 0,
  };
  const { thread, waiting } = opened;
  // An idle thread keeps no process from ending; one that works does.
  thread.unref();
  thread.on("message", (said: StudySaid) => {
    const waits = waiting.get(said.number);
    waiting.delete(said.number);
    if (waiting.size === 0) thread.unref();
    if (said.kind === "done") waits?.resolve(said.found);
    else waits?.reject(new Error(`the study could not be worked out: ${said.message}`));
  });
  const end = (error: Error): void => {
    if (kept.fanfoldStudyThread === opened) delete kept.fanfoldStudyThread;
    for (const { reject } of waiting.values()) reject(error);
    waiting.clear();
  };
  thread.on("error", end);
  thread.on("exit", (code) => end(new Error(`the study's thread ended early (${code})`)));
  return opened;
}

/**
 * Works a study out in a thread of its own, so that no request waits behind another's arithmetic. The thread is started
 * with the first question and stays; after a failure of it the next question starts another.
 */
export function computeStudyInThread(question: StudyQuestion): Promise<Computed> {
  const { thread, waiting, asked } = (kept.fanfoldStudyThread ??= open());
  const number = asked + 1;
  kept.fanfoldStudyThread.asked = number;
  return new Promise<Computed>((resolve, reject) => {
    waiting.set(number, { resolve, reject });
    thread.ref();
    thread.postMessage({ number, question } satisfies StudyOrder);
  });
}

/** Ends the thread, for tests and for a process that closes down. */
export async function endStudyThread(): Promise<void> {
  const opened = kept.fanfoldStudyThread;
  delete kept.fanfoldStudyThread;
  await opened?.thread.terminate();
}
