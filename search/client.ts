import { Meilisearch, MeilisearchRequestTimeOutError } from "meilisearch";
import { requiredEnv } from "@/lib/env/env";

/** A task of bulk indexing takes longer than the client's own five seconds. */
const TASK_TIMEOUT_MS = 120_000;
const TASK_INTERVAL_MS = 20;

export type SearchAccess = { host: string; apiKey: string };

/**
 * Client of the search service; the same for a hosted service and for the stand-in on loopback. `requestTimeoutMs`
 * ends a request that gets no answer, so that a page can fall back to the database.
 */
export function createSearchClient(access: SearchAccess, requestTimeoutMs = 10_000): Meilisearch {
  return new Meilisearch({
    host: access.host,
    apiKey: access.apiKey,
    timeout: requestTimeoutMs,
    defaultWaitOptions: { timeout: TASK_TIMEOUT_MS, interval: TASK_INTERVAL_MS },
  });
}

/** Where the service is and the key for it, from the environment; throws when either is missing. */
export function searchAccess(): SearchAccess {
  return { host: requiredEnv("MEILI_HOST"), apiKey: requiredEnv("MEILI_API_KEY") };
}

/** Whether a request ended because no answer came in its time; the client wraps that in an error of its own. */
export const isTimeOut = (error: unknown): boolean =>
  error instanceof MeilisearchRequestTimeOutError || (error instanceof Error && isTimeOut(error.cause));
