import { migrateDown, migrateUp, pendingMigrations } from "@/db/client/migrator";
import { roleNames } from "@/db/cluster/roles";
import { ownerDb } from "@/db/client/handles";
import { installJobs } from "@/lib/services/jobs/install";
import { ownerUrl } from "./launch/running-demo";

/**
 * Brings a database up to date: the product's tables, then the job queues'.
 *
 * @param ownerUrl the owner's address
 * @returns the names of the migrations applied
 */
export function migrateEverything(ownerUrl: string): Promise<string[]> {
  return migrateUp(ownerUrl, async (owner) => {
    // So that a process that may not migrate can see that somebody has to.
    await owner.raw("grant select on schema_migration to ??", [roleNames.app]);
    await installJobs(ownerUrl, (sql) => Promise.resolve(owner.raw(sql)), roleNames.app);
  });
}

async function main(order: string): Promise<void> {
  const url = ownerUrl();
  if (order === "up") return report("Applied", await migrateEverything(url));
  if (order === "down") return report("Taken back", await migrateDown(url, false));
  if (order === "down-all") return report("Taken back", await migrateDown(url, true));
  if (order === "status") {
    const owner = ownerDb(url);
    return report("Pending", await pendingMigrations(owner).finally(() => owner.destroy()));
  }
  throw new Error(`Unknown order ${order}. Use: npm run migrate -- up | down | down-all | status`);
}

function report(what: string, names: string[]): void {
  console.log(names.length === 0 ? `${what}: nothing` : `${what}:\n  ${names.join("\n  ")}`);
}

if (process.argv[1] === import.meta.filename) {
  try {
    await main(process.argv[2] ?? "up");
  } catch (error) {
    console.error(error instanceof Error ? error.message : error);
    process.exitCode = 1;
  }
}
