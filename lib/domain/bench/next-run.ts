import type { MissingRuns } from "./missing-runs";

/** What is run in a session: an entry's copy, or a baseline unit. */
export type SubjectKey = { readonly entryId: string | null; readonly baselineUnitId: string | null };

/** What is still asked of one subject of a session; the session's own baseline unit stands first. */
export type SubjectLeft = SubjectKey & { readonly missing: readonly MissingRuns[] };

export type NextRun = SubjectKey & { readonly setSpeed: number; readonly mount: number };

/** Whether two keys name the same subject: the entry, whatever its copy; else the unit. */
export function sameSubject(a: SubjectKey, b: SubjectKey): boolean {
  return a.entryId === b.entryId && (a.entryId !== null || a.baselineUnitId === b.baselineUnitId);
}

/**
 * The run that comes next: the baseline's first mount, then the other subjects in their order, then the baseline's last
 * mount. Undefined when nothing is missing.
 */
export function nextRun(subjects: readonly SubjectLeft[]): NextRun | undefined {
  const baseline = subjects.find((subject) => subject.entryId === null);
  const first = baseline?.missing.find(({ mount }) => mount === 1);
  const other = subjects.find((subject) => subject !== baseline && subject.missing.length > 0);
  const subject = first || !other ? baseline : other;
  const run = first ?? subject?.missing[0];
  if (!run || !subject) return undefined;
  const { entryId, baselineUnitId } = subject;
  return { entryId, baselineUnitId, setSpeed: run.setSpeed, mount: run.mount };
}
