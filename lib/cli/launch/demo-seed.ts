import { existsSync } from "node:fs";
import path from "node:path";
import { pathToFileURL } from "node:url";
import type { Handle } from "@/db/client/connect";
import { ownerDb } from "@/db/client/handles";
import type { Cluster } from "@/db/cluster/cluster";
import { dropDatabase, ensureDatabase } from "@/db/cluster/roles";
import { migrateEverything } from "../migrate";
import type { Lifetime } from "./lifetime";

/** What the demo's seed module gives: it fills a migrated, empty database as its owner. */
interface SeedModule {
  seedDemo(owner: Handle): Promise<void>;
}

/** Whether the database holds the demo, whose accounts have a known password. */
export async function holdsDemo(handle: Handle): Promise<boolean> {
  return (await handle("demo_seed").first("only_one")) !== undefined;
}

/**
 * Migrates the local database and seeds the demo once. A seed that was cut off left no marker: then the database, which
 * nobody has used yet, is made anew.
 */
export async function prepareDemoDatabase(
  life: Lifetime,
  cluster: Cluster,
  root: string,
  database: string,
): Promise<void> {
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
  const file = path.join(root, "lib/cli/demo/seed-demo.ts");
  if (!existsSync(file)) return;
  console.log("Seeding the demo …");
  const { seedDemo } = (await import(pathToFileURL(file).href)) as SeedModule;
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
