import type { Protocol } from "./protocol";

/** A run that is done: one subject at one set speed in one mount. Held and discarded runs are left out by the caller. */
export type DoneRun = { readonly setSpeed: number; readonly mount: number };

type Asked = Pick<Protocol, "setSpeeds" | "mounts" | "runsPerMount">;

export type MissingRuns = { readonly setSpeed: number; readonly mount: number; readonly runs: number };

/**
 * What the protocol still asks of one entry, by mount, then by rising set speed; empty when nothing is missing.
 * Mounts count as they come: the numbers of those that have runs, then the lowest free numbers.
 */
export function missingRuns(protocol: Asked, done: readonly DoneRun[]): MissingRuns[] {
  const begun = [...new Set(done.map(({ mount }) => mount))].sort((a, b) => a - b);
  const mounts = [...begun];
  for (let next = 1; mounts.length < protocol.mounts; next++) if (!begun.includes(next)) mounts.push(next);
  const speeds = [...protocol.setSpeeds].sort((a, b) => a - b);
  return mounts.flatMap((mount) =>
    speeds.flatMap((setSpeed) => {
      const runs = done.filter((run) => run.mount === mount && run.setSpeed === setSpeed).length;
      return runs < protocol.runsPerMount ? [{ setSpeed, mount, runs: protocol.runsPerMount - runs }] : [];
    }),
  );
}
