import type { Handle } from "@/db/client/connect";
import { ownerDb } from "@/db/client/handles";
import type { Cluster } from "@/db/cluster/cluster";
import { dropDatabase, ensureDatabase } from "@/db/cluster/roles";
import { seedDemo } from "../demo/seed-demo";
import { migrateEverything } from "../migrate";
import type { Lifetime } from "./lifetime";

/** Whether the database holds the demo, whose accounts have a known password. */
export async function holdsDemo(handle: Handle): Promise<boolean> {
  return (await handle("demo_seed").first("only_one")) !== undefined;
}

/**
 * Migrates the local database and seeds the demo once. A seed that was cut off left no marker: then the database, which
 * nobody has used yet, is made anew.
 */
export async function prepareDemoDatabase(life: Lifetime, cluster: Cluster, database: string): Promise<void> {
  const { owner: url } = cluster.urls(database);
  await ensureDatabase(cluster.adminUrl, database);
  await migrateEverything(url);
  if (await ask(url, holdsDemo)) return;
  life.check();
  if (await ask(url, async (owner) => (await owner("person").first("id")) !== undefined)) {
    await dropDatabase(cluster.adminUrl, database);
    await ensureDatabase(cluster.adminUrl, database);
    await migrateEverything(url);
  }
  console.log("Seeding the demo …");
  await ask(url, async (owner) => {
    await seedDemo(owner);
    await owner("demo_seed").insert({ version: 1 }).onConflict("only_one").ignore();
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
