import type { TestProject } from "vitest/node";
import type { DatabaseUrls } from "@/db/cluster/cluster";
import { ensureDatabase } from "@/db/cluster/roles";
import { migrateEverything } from "@/lib/cli/migrate";
import { onInterrupt } from "./interrupt";
import { temporaryCluster } from "./temporary-cluster";

declare module "vitest" {
  interface ProvidedContext {
    cluster: { adminUrl: string; template: string; templateUrls: DatabaseUrls };
  }
}

/** Starts one throw-away database server for all files of the project and migrates one database that each file copies. */
export default async function setup(project: TestProject): Promise<() => Promise<void>> {
  const cluster = await temporaryCluster();
  const forget = onInterrupt(() => cluster.stop());
  try {
    const template = "template_migrated";
    await ensureDatabase(cluster.adminUrl, template);
    await migrateEverything(cluster.urls(template).owner);
    project.provide("cluster", { adminUrl: cluster.adminUrl, template, templateUrls: cluster.urls(template) });
  } catch (error) {
    await cluster.stop();
    throw error;
  }
  return async () => {
    forget();
    await cluster.stop();
  };
}
