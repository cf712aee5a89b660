import { closeDbs } from "@/db/client/handles";
import { requiredEnv } from "@/lib/env/env";
import { jobHandlers, jobSchedules, loops } from "@/lib/server/jobs/registry";
import { log } from "@/lib/server/log";
import { startJobs, type Jobs, type QueueName } from "@/lib/services/jobs/jobs";
import { queueNames } from "@/lib/services/jobs/queues";

/** `npm run worker`: works jobs and runs the sending loops until told to stop. Any number of them may run. */
async function main(): Promise<void> {
  const stopping = new AbortController();
  for (const name of ["SIGTERM", "SIGINT", "SIGHUP"] as const) process.on(name, () => stopping.abort());
  const jobs = await startJobs({
    databaseUrl: requiredEnv("DATABASE_URL"),
    works: true,
    onError: (error) => log().error({ err: error }, "job queue"),
  });
  for (const name of queueNames) await workQueue(jobs, name);
  for (const each of jobSchedules) await jobs.schedule(each.queue, each.cron, each.data);
  log().info({ queues: Object.keys(jobHandlers), loops: loops.map((each) => each.name) }, "worker runs");
  const running = loops.map((each) => each.run(stopping.signal));
  // A loop handles its own errors; one that ends early or throws is a fault, and the whole worker stops for it.
  const early = running.map((each, n) =>
    each.then(() => {
      if (!stopping.signal.aborted) throw new Error(`The loop ${loops[n]?.name} ended.`);
    }),
  );
  const asked = new Promise<void>((resolve) => stopping.signal.addEventListener("abort", () => resolve()));
  try {
    await Promise.race([asked, ...early.map((each) => each.then(() => asked))]);
  } finally {
    stopping.abort();
    await Promise.allSettled(running);
    await jobs.stop(5_000);
    await closeDbs();
  }
}

async function workQueue<N extends QueueName>(jobs: Jobs, name: N): Promise<void> {
  const handler = jobHandlers[name];
  if (!handler) return;
  await jobs.work(name, async (data, jobId) => {
    try {
      await handler(data, jobId);
    } catch (error) {
      log().error({ err: error, queue: name, jobId }, "job failed");
      throw error;
    }
  });
}

try {
  await main();
  process.exit(0);
} catch (error) {
  log().fatal({ err: error }, "worker stops");
  process.exit(1);
}
