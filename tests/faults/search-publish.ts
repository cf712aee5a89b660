import { setTimeout as after } from "node:timers/promises";
import { appDb, closeDbs } from "@/db/client/handles";

/** Writes rows of the read model in one transaction, as publishing does, and stops before it commits or commits. */
const commits = process.argv[2] === "commit";
await appDb().transaction(async (tx) => {
  await tx.raw("insert into published_entry select * from kept");
  process.stdout.write("written\n");
  // Idle, not asleep in the server: a backend at work doesn't notice that its client was killed.
  if (!commits) await after(600_000);
});
process.stdout.write("committed\n");
await closeDbs();
