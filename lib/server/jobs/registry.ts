import type { JobData, JobHandler, QueueName } from "@/lib/services/jobs/jobs";

/** Work that goes on as long as the worker runs, the outbox's sender say; it ends soon after the signal. */
export interface Loop {
  name: string;
  run(signal: AbortSignal): Promise<void>;
}

interface Schedule<N extends QueueName> {
  queue: N;
  /** Cron, in UTC. */
  cron: string;
  data: JobData<N>;
}

/** What the worker does with each queue. A queue without a handler is left to another worker. */
export const jobHandlers: { [N in QueueName]?: JobHandler<N> } = {};

/** What is sent by the clock, however many workers run. */
export const jobSchedules: Schedule<QueueName>[] = [];

export const loops: Loop[] = [];
