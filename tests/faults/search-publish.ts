import { appDb, closeDbs } from "@/db/client/handles";

/** Writes rows of the read model in one transaction, as publishing does, and stops before it commits or commits. */
const commits = process.argv[2] === "commit";
await appDb().transaction(async (tx) => {
  await tx.raw("insert into published_entry select * from kept");
  process.stdout.write("written\n");
  if (!commits) await tx.raw("select pg_sleep(600)");
});
process.stdout.write("committed\n");
await closeDbs();
