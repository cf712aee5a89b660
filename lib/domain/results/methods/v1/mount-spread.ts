/** What one subject showed at one set speed: one number a mount, already the mean of that mount's repeats. */
export type MountMeans = { readonly subject: string; readonly means: readonly number[] };

/**
 * Standard deviation between mounts, pooled over subjects and set speeds of a session: √(Σ(x − x̄)² / Σ(m − 1)), in the
 * unit of the means (ISO 5725-2:1994, 7.4.5, pooled variance; clause from memory). A mount's error is one at all its
 * set speeds, so the degrees of freedom count each subject's mounts once: Σ over subjects of (most mounts − 1).
 * Undefined where no subject was mounted twice.
 */
export function pooledMountSd(groups: readonly MountMeans[]): { s: number; dof: number } | undefined {
  let squares = 0;
  let divisor = 0;
  const mounts = new Map<string, number>();
  for (const { subject, means } of groups) {
    if (means.length < 2) continue;
    const mean = means.reduce((sum, x) => sum + x, 0) / means.length;
    squares += means.reduce((sum, x) => sum + (x - mean) ** 2, 0);
    divisor += means.length - 1;
    mounts.set(subject, Math.max(mounts.get(subject) ?? 0, means.length));
  }
  if (divisor === 0) return undefined;
  const dof = [...mounts.values()].reduce((sum, m) => sum + m - 1, 0);
  return { s: Math.sqrt(squares / divisor), dof };
}

/** A standard uncertainty and its degrees of freedom; Infinity where it is taken as known. */
export type Sized = { readonly u: number; readonly dof: number };

/**
 * The part of a mount: the larger of what the bench's budget says and what this session showed, so that a session
 * whose remounts scattered more than the qualification is not flattered (house rule, no source). What single runs
 * scatter is in the observed spread and is taken out of it: s_mount² = s² − u_own².
 */
export function mountPart(budget: Sized, own: Sized, observed: { s: number; dof: number } | undefined): Sized {
  if (!observed) return budget;
  const left = Math.sqrt(Math.max(0, observed.s ** 2 - own.u ** 2));
  return left > budget.u ? { u: left, dof: observed.dof } : budget;
}
