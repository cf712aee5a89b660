import type { HostRound } from "@/lib/contracts/seasons-admin";

/** Whether a round waits only for the worker: scheduled, and its hour has come. */
export function isDue({ state, publishAt }: Pick<HostRound, "state" | "publishAt">, now: Date = new Date()): boolean {
  return state === "scheduled" && publishAt !== null && new Date(publishAt).getTime() <= now.getTime();
}
