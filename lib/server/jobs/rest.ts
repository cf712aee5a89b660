import { setTimeout as after } from "node:timers/promises";

/** Waits `ms` milliseconds, or until `signal` aborts, at once where it already has. Never rejects. */
export function rest(ms: number, signal: AbortSignal): Promise<void> {
  return after(ms, undefined, { signal }).catch(() => undefined);
}
