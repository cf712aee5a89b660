import type { ErrorBody } from "./errors";
import { ServiceError } from "./errors";

export type TaskStatus = "enqueued" | "processing" | "succeeded" | "failed" | "canceled";
export type TaskType =
  | "documentAdditionOrUpdate"
  | "documentDeletion"
  | "settingsUpdate"
  | "indexCreation"
  | "indexUpdate"
  | "indexDeletion"
  | "indexSwap"
  | "taskCancelation"
  | "taskDeletion";
export type Task = {
  uid: number;
  batchUid: number | null;
  indexUid: string | null;
  status: TaskStatus;
  type: TaskType;
  canceledBy: number | null;
  details: Record<string, unknown> | null;
  error: ErrorBody | null;
  duration: string | null;
  enqueuedAt: string;
  startedAt: string | null;
  finishedAt: string | null;
};
export type EnqueuedTask = {
  taskUid: number;
  indexUid: string | null;
  status: "enqueued";
  type: TaskType;
  enqueuedAt: string;
};

/** What to do when a task's turn comes; it may fill in the details, and a refusal fails the task. */
export type Work = (task: Task) => void;

/**
 * A task waits at least this long, so that callers that forget to wait see the state before it, and a wait of a
 * millisecond runs out even on a busy machine. Shorter than the client's pause between two looks.
 */
const DELAY_MS = 15;
/** So many tasks are remembered; beyond, the oldest finished ones are forgotten, as the service does at a million. */
const TASKS_MAX = 100_000;
const FORGOTTEN_AT_ONCE = 10_000;
/** Quiet time after the last task before `onIdle` is called, so that a run of tasks isn't slowed down by it. */
const IDLE_MS = 150;

/** Carries tasks out one after the other in the order in which they came; cancelations go first. */
export class TaskQueue {
  private readonly tasks = new Map<number, Task>();
  private readonly waiting: { task: Task; work: Work; readyAtMs: number }[] = [];
  private nextUid = 0;
  private timer: NodeJS.Timeout | undefined;
  private idleTimer: NodeJS.Timeout | undefined;
  private isClosed = false;

  /** `onIdle` is called when nothing has been waiting for a while. */
  constructor(private readonly onIdle: () => void) {}

  enqueue(type: TaskType, indexUid: string | null, details: Record<string, unknown> | null, work: Work): EnqueuedTask {
    const task: Task = {
      uid: this.nextUid,
      batchUid: null,
      indexUid,
      status: "enqueued",
      type,
      canceledBy: null,
      details,
      error: null,
      duration: null,
      enqueuedAt: new Date().toISOString(),
      startedAt: null,
      finishedAt: null,
    };
    this.nextUid += 1;
    if (this.tasks.size >= TASKS_MAX) this.forgetOldest();
    this.tasks.set(task.uid, task);
    const entry = { task, work, readyAtMs: performance.now() + DELAY_MS };
    if (type === "taskCancelation") this.waiting.unshift(entry);
    else this.waiting.push(entry);
    this.schedule();
    return { taskUid: task.uid, indexUid, status: "enqueued", type, enqueuedAt: task.enqueuedAt };
  }

  get(uid: number): Task {
    const task = this.tasks.get(uid);
    if (task === undefined) throw new ServiceError("task_not_found", `Task \`${uid}\` not found.`);
    return task;
  }

  /** All tasks, newest first. */
  all(): Task[] {
    return [...this.tasks.values()].reverse();
  }

  isBusyWith(indexUid: string): boolean {
    return this.waiting.some(({ task }) => task.indexUid === indexUid && task.status === "processing");
  }

  /** Cancels those of the listed tasks that are still waiting; gives their number. */
  cancel(uids: readonly number[], by: number): number {
    const wanted = new Set(uids);
    let canceled = 0;
    for (let i = this.waiting.length - 1; i >= 0; i -= 1) {
      const task = this.waiting[i]?.task;
      if (task === undefined || task.status !== "enqueued" || !wanted.has(task.uid)) continue;
      this.waiting.splice(i, 1);
      Object.assign(task, { status: "canceled", canceledBy: by, finishedAt: new Date().toISOString() });
      canceled += 1;
    }
    return canceled;
  }

  /** Forgets those of the listed tasks that are finished; gives their number. */
  forget(uids: readonly number[]): number {
    let deleted = 0;
    for (const uid of uids) {
      const status = this.tasks.get(uid)?.status;
      if (status === undefined || status === "enqueued" || status === "processing") continue;
      this.tasks.delete(uid);
      deleted += 1;
    }
    return deleted;
  }

  /** Moves the history of finished tasks along with indexes that change names. */
  renameIndex(rename: (uid: string) => string): void {
    for (const task of this.tasks.values()) {
      const isDone = task.status !== "enqueued" && task.status !== "processing";
      if (isDone && task.indexUid !== null) task.indexUid = rename(task.indexUid);
    }
  }

  private forgetOldest(): void {
    this.forget([...this.tasks.keys()].slice(0, FORGOTTEN_AT_ONCE));
  }

  close(): void {
    this.isClosed = true;
    clearTimeout(this.timer);
    clearTimeout(this.idleTimer);
  }

  private schedule(): void {
    const next = this.waiting[0];
    if (this.timer !== undefined || this.isClosed) return;
    clearTimeout(this.idleTimer);
    if (next === undefined) {
      this.idleTimer = setTimeout(this.onIdle, IDLE_MS).unref();
      return;
    }
    this.timer = setTimeout(
      () => {
        this.timer = undefined;
        this.runNext();
        this.schedule();
      },
      Math.max(0, next.readyAtMs - performance.now()),
    );
  }

  private runNext(): void {
    const next = this.waiting[0];
    if (next === undefined) return;
    const { task, work } = next;
    const startMs = performance.now();
    task.status = "processing";
    task.batchUid = task.uid;
    task.startedAt = new Date().toISOString();
    try {
      work(task);
      task.status = "succeeded";
    } catch (error) {
      const refusal = error instanceof ServiceError ? error : new ServiceError("internal", String(error));
      task.status = "failed";
      task.error = refusal.toBody();
    }
    task.finishedAt = new Date().toISOString();
    task.duration = `PT${((performance.now() - startMs) / 1000).toFixed(6)}S`;
    const at = this.waiting.indexOf(next);
    if (at >= 0) this.waiting.splice(at, 1);
  }
}
