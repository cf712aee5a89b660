import type { MissingRuns } from "./missing-runs";

/** What is still asked of one subject of a session; the baseline has no entry. */
export type SubjectLeft = { readonly entryId: string | null; readonly missing: readonly MissingRuns[] };

export type NextRun = { readonly entryId: string | null; readonly setSpeed: number; readonly mount: number };

/**
 * The run that comes next: the baseline's first mount, then the entries in their order, then the baseline's last
 * mount. Undefined when nothing is missing.
 */
export function nextRun(subjects: readonly SubjectLeft[]): NextRun | undefined {
  const baseline = subjects.find((subject) => subject.entryId === null);
  const first = baseline?.missing.find(({ mount }) => mount === 1);
  const entry = subjects.find((subject) => subject.entryId !== null && subject.missing.length > 0);
  const run = first ?? entry?.missing[0] ?? baseline?.missing[0];
  if (!run) return undefined;
  return { entryId: first || !entry ? null : entry.entryId, setSpeed: run.setSpeed, mount: run.mount };
}
