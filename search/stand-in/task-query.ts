import { ServiceError } from "./errors";
import { readCount, readFlag } from "./search-params";
import type { Task } from "./tasks";

const STATUSES = ["enqueued", "processing", "succeeded", "failed", "canceled"];
const TYPES = [
  "documentAdditionOrUpdate",
  "documentEdition",
  "documentDeletion",
  "settingsUpdate",
  "indexCreation",
  "indexDeletion",
  "indexUpdate",
  "indexSwap",
  "taskCancelation",
  "taskDeletion",
  "dumpCreation",
  "snapshotCreation",
  "export",
  "upgradeDatabase",
  "indexCompaction",
  "networkTopologyChange",
];
const DATES = ["EnqueuedAt", "StartedAt", "FinishedAt"].flatMap((each) => [`before${each}`, `after${each}`]);
const FILTERS = ["uids", "batchUids", "canceledBy", "types", "statuses", "indexUids", ...DATES];
const DATE = /^\d{4}-\d{2}-\d{2}(T\d{2}:\d{2}:\d{2}(\.\d+)?(Z|[+-]\d{2}:\d{2}))?$/;

const snake = (name: string): string => name.replace(/[A-Z]/g, (letter) => `_${letter.toLowerCase()}`);

/** Test of a task against the filters of an address; unknown names and bad values are refused. */
function readFilters(query: URLSearchParams, alsoAllowed: readonly string[]): (task: Task) => boolean {
  const tests: ((task: Task) => boolean)[] = [];
  for (const [name, text] of query) {
    if (alsoAllowed.includes(name)) continue;
    if (!FILTERS.includes(name)) {
      const list = [...alsoAllowed, ...FILTERS].map((each) => `\`${each}\``).join(", ");
      throw new ServiceError("bad_request", `Unknown parameter \`${name}\`: expected one of ${list}`);
    }
    if (text === "*") continue;
    tests.push(DATES.includes(name) ? dateTest(name, text) : listTest(name, text.split(",")));
  }
  return (task) => tests.every((test) => test(task));
}

function listTest(name: string, values: string[]): (task: Task) => boolean {
  const code = `invalid_task_${snake(name)}`;
  if (name === "types" || name === "statuses") {
    const known = name === "types" ? TYPES : STATUSES;
    const what = name === "types" ? "type" : "status";
    const found = values.map((value) => known.find((each) => each.toLowerCase() === value.toLowerCase()));
    const odd = found.indexOf(undefined);
    if (odd >= 0) {
      const list = known.map((each) => `\`${each}\``).join(", ");
      throw new ServiceError(
        code,
        `Invalid value in parameter \`${name}[${odd}]\`: \`${values[odd]}\` is not a valid task ${what}. Available ${what === "type" ? "types" : "statuses"} are ${list}.`,
      );
    }
    return (task) => found.includes(name === "types" ? task.type : task.status);
  }
  if (name === "indexUids") return (task) => task.indexUid !== null && values.includes(task.indexUid);
  const uids = values.map((value, i) => readCount(`${name}[${i}]`, value, code));
  const field = name === "uids" ? "uid" : name === "batchUids" ? "batchUid" : "canceledBy";
  return (task) => uids.includes(task[field] ?? -1);
}

function dateTest(name: string, text: string): (task: Task) => boolean {
  const limit = Date.parse(text);
  if (!DATE.test(text) || Number.isNaN(limit)) {
    throw new ServiceError(
      `invalid_task_${snake(name)}`,
      `Invalid value in parameter \`${name}\`: \`${text}\` is an invalid date-time. It should follow the YYYY-MM-DD or RFC 3339 date-time format.`,
    );
  }
  const isBefore = name.startsWith("before");
  const field = name.endsWith("EnqueuedAt") ? "enqueuedAt" : name.endsWith("StartedAt") ? "startedAt" : "finishedAt";
  return (task) => {
    const at = task[field];
    return at !== null && (isBefore ? Date.parse(at) < limit : Date.parse(at) > limit);
  };
}

type TaskPage = { results: Task[]; total: number; limit: number; from: number | null; next: number | null };

/** One page of tasks, newest first unless reversed. */
export function listTasks(tasks: readonly Task[], query: URLSearchParams): TaskPage {
  const accepts = readFilters(query, ["limit", "from", "reverse"]);
  const limit = readCount("limit", query.get("limit") ?? "20", "invalid_task_limit");
  const fromText = query.get("from");
  const from = fromText === null ? undefined : readCount("from", fromText, "invalid_task_from");
  const isReversed = readFlag("reverse", query.get("reverse") ?? "false", "invalid_task_reverse");
  const accepted = tasks.filter(accepts);
  if (isReversed) accepted.reverse();
  const isAtOrAfter = (task: Task): boolean => from === undefined || (isReversed ? task.uid >= from : task.uid <= from);
  const page = accepted.filter(isAtOrAfter).slice(0, limit + 1);
  const next = page.length > limit ? page[limit]?.uid : undefined;
  const results = page.slice(0, limit);
  return { results, total: accepted.length, limit, from: results[0]?.uid ?? null, next: next ?? null };
}

/** One page of batches: every task that was carried out is a batch of its own here. */
export function listBatches(tasks: readonly Task[], query: URLSearchParams): Record<string, unknown> {
  const { results, ...page } = listTasks(
    tasks.filter((task) => task.batchUid !== null),
    query,
  );
  return { results: results.map(describeBatch), ...page };
}

/** The batch that a task makes up alone, as the service writes a batch of one. */
export function describeBatch(task: Task): Record<string, unknown> {
  return {
    uid: task.batchUid,
    progress: null,
    details: task.details ?? {},
    stats: {
      totalNbTasks: 1,
      status: { [task.status]: 1 },
      types: { [task.type]: 1 },
      indexUids: task.indexUid === null ? {} : { [task.indexUid]: 1 },
    },
    duration: task.duration,
    startedAt: task.startedAt,
    finishedAt: task.finishedAt,
    batchStrategy: `created batch containing only task with id ${task.uid} of type \`${task.type}\` that cannot be batched with any other task.`,
  };
}

/** Numbers of the tasks that a cancelation or deletion names; without any filter it is refused. */
export function selectTasks(tasks: readonly Task[], query: URLSearchParams, what: "cancel" | "delete"): number[] {
  if ([...query.keys()].length === 0) {
    const list = FILTERS.map((each) => `\`${each}\``).join(", ");
    throw new ServiceError(
      "missing_task_filters",
      `Query parameters to filter the tasks to ${what} are missing. Available query parameters are: ${list}.`,
    );
  }
  return tasks.filter(readFilters(query, [])).map((task) => task.uid);
}
