import { z } from "zod";

interface QueueSettings {
  /** What a job of this queue carries; checked when it is sent and again when it is worked. Ids only: rows hold the rest. */
  data: z.ZodType<object>;
  retryLimit: number;
  /** A job that isn't done in this time counts as failed and is tried again. */
  expireInSeconds: number;
}

/** The queues, which the migration makes: the application's role may not make tables. */
export const jobQueues = {
  /** A file in quarantine is hashed, read in bounded time and memory, and moved to its content address. */
  "file-read": { data: z.strictObject({ uploadId: z.uuid() }), retryLimit: 2, expireInSeconds: 300 },
  /** A model that is kept already is read and drawn, in bounded time and memory. */
  "model-read": { data: z.strictObject({ fileId: z.uuid() }), retryLimit: 2, expireInSeconds: 300 },
  /** A recording of the bench is read in a thread, in bounded time and memory. */
  "recording-read": { data: z.strictObject({ recordingId: z.uuid() }), retryLimit: 2, expireInSeconds: 300 },
  /** Publishes the rounds whose hour has come. Sent every minute by the clock. */
  "publish-due": { data: z.strictObject({}), retryLimit: 0, expireInSeconds: 300 },
  /** Compares the search index with the database and mends what differs. Sent nightly by the clock. */
  "search-compare": { data: z.strictObject({}), retryLimit: 1, expireInSeconds: 1_800 },
  /** Fills the search index anew from the database. */
  "search-rebuild": { data: z.strictObject({}), retryLimit: 1, expireInSeconds: 60 },
  /** Works out the trait studies that everybody is shown first, where what is public has changed. Sent every minute. */
  "study-refresh": { data: z.strictObject({}), retryLimit: 0, expireInSeconds: 1_800 },
  /** Deletes what has run out: tokens, rate windows, idempotency keys, abandoned uploads. Sent hourly by the clock. */
  sweep: { data: z.strictObject({}), retryLimit: 0, expireInSeconds: 300 },
} as const satisfies Record<string, QueueSettings>;

export type QueueName = keyof typeof jobQueues;
export type JobData<N extends QueueName> = z.infer<(typeof jobQueues)[N]["data"]>;
export const queueNames = Object.keys(jobQueues) as QueueName[];
