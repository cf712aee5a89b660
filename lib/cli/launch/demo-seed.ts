import type { Handle } from "@/db/client/connect";
import { ownerDb } from "@/db/client/handles";
import type { Cluster, DatabaseUrls } from "@/db/cluster/cluster";
import { dropDatabase, ensureDatabase } from "@/db/cluster/roles";
import { childEnvironment } from "@/lib/env/env";
import { migrateEverything } from "../migrate";
import { runChild } from "./children";
import type { LaunchLedger } from "./ledger";
import type { Lifetime } from "./lifetime";

/** Whether the database holds the demo, whose accounts have a known password. */
export async function holdsDemo(handle: Handle): Promise<boolean> {
  return (await handle("demo_seed").first("only_one")) !== undefined;
}

/**
 * Migrates the local database and seeds the demo once. A seed that was cut off left no marker: then the database, which
 * nobody has used yet, is made anew.
 *
 * @param seed fills the database and sets the marker
 */
export async function prepareDemoDatabase(
  cluster: Cluster,
  database: string,
  seed: (urls: DatabaseUrls) => Promise<void>,
): Promise<void> {
  const urls = cluster.urls(database);
  await ensureDatabase(cluster.adminUrl, database);
  await migrateEverything(urls.owner);
  if (await ask(urls.owner, holdsDemo)) return;
  if (await ask(urls.owner, async (owner) => (await owner("person").first("id")) !== undefined)) {
    await dropDatabase(cluster.adminUrl, database);
    await ensureDatabase(cluster.adminUrl, database);
    await migrateEverything(urls.owner);
  }
  console.log("Seeding the demo …");
  await seed(urls);
}

/** Seeds in a child process. @param dataFolder where files go */
export function seedInChild(
  life: Lifetime,
  ledger: LaunchLedger | undefined,
  root: string,
  dataFolder: string,
): (urls: DatabaseUrls) => Promise<void> {
  return (urls) =>
    runChild(life, ledger, {
      name: "Seeding the demo",
      command: process.execPath,
      args: ["--import", "tsx", "lib/cli/seed-demo.ts"],
      cwd: root,
      env: childEnvironment({
        NODE_ENV: "production",
        DATABASE_URL: urls.app,
        PUBLIC_DATABASE_URL: urls.public,
        MIGRATE_DATABASE_URL: urls.owner,
        DATA_DIR: dataFolder,
        FANFOLD_DEMO: "1",
      }),
    });
}

async function ask<T>(url: string, question: (owner: Handle) => Promise<T>): Promise<T> {
  const owner = ownerDb(url);
  try {
    return await question(owner);
  } finally {
    await owner.destroy();
  }
}
