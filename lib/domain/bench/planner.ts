import type { Protocol } from "./protocol";

/** Bench minutes that one entry asks for: every mount, and in each mount every run at every set speed. */
export function minutesOfEntry(protocol: Protocol): number {
  return protocol.mounts * minutesOfMount(protocol, protocol.runsPerMount);
}

/** Bench minutes that a session asks for beside its entries: the baseline first and last, one mount each, one run a speed. */
export function minutesOfBaselines(protocol: Protocol): number {
  return 2 * minutesOfMount(protocol, 1);
}

function minutesOfMount({ minutesPerMount, minutesPerRun, setSpeeds }: Protocol, runs: number): number {
  return minutesPerMount + setSpeeds.length * runs * minutesPerRun;
}

export type BenchPlan = {
  /** Hours of one entry alone. */
  readonly hoursPerEntry: number;
  /** Entries that go into one session beside the baseline's first and last runs. */
  readonly entriesPerSession: number;
  readonly sessions: number;
  /** Hours at the bench for all entries and the baselines of their sessions. */
  readonly hours: number;
};

/**
 * What a number of entries asks of the bench: shown before any of them is accepted. Set-up, calibrator and background
 * are not in it.
 * @param entries 0 or more @param sessionHours length of a session, above 0
 * @returns undefined where not even one entry goes into a session of that length
 */
export function planBench(protocol: Protocol, entries: number, sessionHours: number): BenchPlan | undefined {
  const entryMinutes = minutesOfEntry(protocol);
  const left = sessionHours * 60 - minutesOfBaselines(protocol);
  const entriesPerSession = Math.floor(left / entryMinutes + 1e-9);
  if (!(entriesPerSession >= 1)) return undefined;
  const sessions = Math.ceil(entries / entriesPerSession);
  const minutes = entries * entryMinutes + sessions * minutesOfBaselines(protocol);
  return { hoursPerEntry: entryMinutes / 60, entriesPerSession, sessions, hours: minutes / 60 };
}
