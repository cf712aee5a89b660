import { randomUUID } from "node:crypto";
import PgBoss from "pg-boss";
import { jobsSchema } from "./install";
import { jobQueues, type JobData, type QueueName } from "./queues";

export type { JobData, QueueName };

/** A connection on which a job can be sent as part of the caller's transaction. */
export interface JobExecutor {
  executeSql(text: string, values?: unknown[]): Promise<{ rows: unknown[] }>;
}

export interface SendOptions {
  /** The caller's transaction: the job is there if it commits, and only then. */
  within?: JobExecutor;
  /** While a job with this key waits, another is not sent. */
  onceBy?: string;
  /** Not worked before this time. */
  startAfter?: Date;
}

export type JobHandler<N extends QueueName> = (data: JobData<N>, jobId: string) => Promise<void>;

export interface Jobs {
  /** Sends a job; undefined when one with the same `onceBy` already waits. */
  send<N extends QueueName>(queue: N, data: JobData<N>, options?: SendOptions): Promise<string | undefined>;
  /** Works a queue from now on; a handler that throws fails the job, which is tried again as its queue says. */
  work<N extends QueueName>(queue: N, handler: JobHandler<N>): Promise<void>;
  /** Sends a job by the clock: a cron line in UTC. Replaces the queue's earlier schedule. */
  schedule<N extends QueueName>(queue: N, cron: string, data: JobData<N>): Promise<void>;
  /** Lets running jobs end, within the time, and closes the connections. */
  stop(withinMs?: number): Promise<void>;
}

export interface JobsOptions {
  /** The application role's address. */
  databaseUrl: string;
  /** True in workers: they also expire and archive jobs and send by the clock. Web processes only send. */
  works: boolean;
  /** Hears of errors outside any job, a lost connection say. */
  onError: (error: Error) => void;
  /** How often an idle queue is asked. */
  pollingSeconds?: number;
}

/** Connects to the queues, which migrations have made. Throws when their tables are missing or old. */
export async function startJobs({ databaseUrl, works, onError, pollingSeconds = 2 }: JobsOptions): Promise<Jobs> {
  const boss = new PgBoss({
    connectionString: databaseUrl,
    schema: jobsSchema,
    application_name: works ? "fanfold worker" : "fanfold jobs",
    max: works ? 4 : 2,
    migrate: false,
    supervise: works,
    schedule: works,
  });
  boss.on("error", onError);
  await boss.start();
  return {
    async send(queue, data, { within, onceBy, startAfter } = {}) {
      const checked = jobQueues[queue].data.parse(data);
      const sent = await boss.send(queue, checked, {
        ...(within && { db: { executeSql: (text, values) => within.executeSql(text, values) } }),
        singletonKey: onceBy ?? randomUUID(),
        ...(startAfter && { startAfter }),
      });
      return sent ?? undefined;
    },
    async work(queue, handler) {
      await boss.work<object>(queue, { batchSize: 1, pollingIntervalSeconds: pollingSeconds }, async (batch) => {
        for (const job of batch) await handler(parseData(queue, job.data), job.id);
      });
    },
    async schedule(queue, cron, data) {
      await boss.schedule(queue, cron, jobQueues[queue].data.parse(data), { tz: "UTC" });
    },
    async stop(withinMs = 20_000) {
      await boss.stop({ graceful: true, timeout: withinMs });
    },
  };
}

function parseData<N extends QueueName>(queue: N, data: unknown): JobData<N> {
  return jobQueues[queue].data.parse(data) as JobData<N>;
}
