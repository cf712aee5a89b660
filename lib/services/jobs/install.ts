import PgBoss from "pg-boss";
import { jobQueues, queueNames } from "./queues";

export const jobsSchema = "jobs";

/** The queue that pg-boss keeps for its own clock; it makes it at start, which the application's role may not. */
const clockQueue = "__pgboss__send-it";

/**
 * Makes or migrates the tables of the job queues as the schema's owner and lets the application's role use them.
 *
 * @param ownerUrl the owner's address
 * @param grant runs one statement as the owner
 * @param appRole who works the queues
 */
export async function installJobs(
  ownerUrl: string,
  grant: (sql: string) => Promise<unknown>,
  appRole: string,
): Promise<void> {
  const boss = new PgBoss({
    connectionString: ownerUrl,
    schema: jobsSchema,
    application_name: "fanfold jobs install",
    max: 2,
    schedule: false,
    supervise: false,
  });
  let failure: Error | undefined;
  boss.on("error", (error) => (failure ??= error));
  await boss.start();
  try {
    await boss.createQueue(clockQueue);
    for (const name of queueNames) {
      const { retryLimit, expireInSeconds } = jobQueues[name];
      // "short" keeps one waiting job a key; jobs that may pile up are sent with a key of their own.
      const settings = { name, policy: "short", retryLimit, retryBackoff: true, expireInSeconds } as const;
      await boss.createQueue(name, settings);
      await boss.updateQueue(name, settings);
    }
  } finally {
    await boss.stop({ graceful: false });
  }
  if (failure) throw failure;
  const role = `"${appRole.replaceAll('"', '""')}"`;
  await grant(`grant usage on schema ${jobsSchema} to ${role}`);
  await grant(`grant select, insert, update, delete on all tables in schema ${jobsSchema} to ${role}`);
}
