import { parentPort } from "node:worker_threads";
import type { StudyQuestion } from "@/lib/contracts/study-question";
import { computeStudy } from "./compute-study";

/** What the thread is asked, and what it says: by number, since several may wait. */
export interface StudyOrder {
  number: number;
  question: StudyQuestion;
}
export type StudySaid = { number: number } & (
  { kind: "done"; found: Awaited<ReturnType<typeof computeStudy>> } | { kind: "failed"; message: string }
);

const say = (said: StudySaid): void => parentPort?.postMessage(said);

// One after another: two at once would only take each other's memory.
let before: Promise<void> = Promise.resolve();
parentPort?.on("message", ({ number, question }: StudyOrder) => {
  before = before.then(() =>
    computeStudy(question).then(
      (found) => say({ number, kind: "done", found }),
      (error: unknown) => say({ number, kind: "failed", message: error instanceof Error ? error.message : "" }),
    ),
  );
});
