import { requiredEnv } from "@/lib/env/env";
import { startJobs, type Jobs } from "./jobs";

let kept: Promise<Jobs> | undefined;

/** This process's connection to the job queues, for sending. A failed try is not kept. */
export function jobs(onError: (error: Error) => void): Promise<Jobs> {
  kept ??= startJobs({ databaseUrl: requiredEnv("DATABASE_URL"), works: false, onError }).catch((error: unknown) => {
    kept = undefined;
    throw error;
  });
  return kept;
}
