import { afterAll, afterEach, beforeAll, beforeEach, expect, test } from "vitest";
import type { Knex } from "knex";
import { anyFreePort } from "@/db/cluster/port";
import type { Cluster } from "@/db/cluster/cluster";
import { dropDatabase, ensureDatabase } from "@/db/cluster/roles";
import { connect } from "@/db/client/connect";
import { closeDbs } from "@/db/client/handles";
import { askForRebuild, searchBuild, searchState } from "@/db/queries/search-build";
import { searchCounts } from "@/db/queries/search-outbox";
import { migrateEverything } from "@/lib/cli/migrate";
import { adoptEnvironment } from "@/lib/env/env";
import { indexDifferences } from "@/lib/server/search/compare";
import type { Outlet } from "@/lib/server/search/outlet";
import { indexDigest } from "@/search/document";
import { DESIGNS_INDEX } from "@/search/settings";
import { layOutField, outletOf } from "../setup/search-field";
import { temporaryCluster } from "../setup/temporary-cluster";
import { startProcess, type StartedProcess } from "./search-process";

/*
 * Every process in turn ends by SIGKILL while it works; what is started after it brings database and index together by
 * itself. Nothing here waits for a time: each step waits until something is so, with a bound.
 */
const entries = 2_500;
const boundMs = 120_000;
const apiKey = "search-faults-key";
let cluster: Cluster;
let owner: Knex;
let app: Knex;
let from: Outlet;
let environment: Record<string, string>;
let running: StartedProcess[] = [];

const start = (file: string, ...args: string[]): StartedProcess => {
  const made = startProcess(file, args, environment);
  running.push(made);
  return made;
};
const startService = (): StartedProcess => start("lib/cli/search-stand-in.ts");
const startSender = (): StartedProcess => start("tests/faults/search-sender.ts");
async function holds(what: () => Promise<boolean>): Promise<boolean> {
  for (const end = Date.now() + boundMs; Date.now() < end;) {
    if (await what().catch(() => false)) return true;
    await new Promise((resolve) => setTimeout(resolve, 50));
  }
  return false;
}
const serviceAnswers = (): Promise<boolean> => holds(() => from.client().isHealthy());

/** Nothing waits, no rebuild goes on, and document by document the index is what the world sees. */
const agrees = async (): Promise<boolean> => {
  const { waiting } = await searchCounts(app);
  const isSettled = (await searchState(app)).settingsSha256 === indexDigest() && !(await searchBuild(app));
  return isSettled && waiting === 0 && (await indexDifferences(from))?.length === 0;
};

beforeAll(async () => {
  cluster = await temporaryCluster();
  await ensureDatabase(cluster.adminUrl, "field");
  await migrateEverything(cluster.urls("field").owner);
  const filled = connect(cluster.urls("field").owner);
  await layOutField(filled, entries);
  await filled.destroy();
});
afterAll(() => cluster?.stop());

beforeEach(async () => {
  await ensureDatabase(cluster.adminUrl, "faults", "field");
  const urls = cluster.urls("faults");
  environment = {
    DATABASE_URL: urls.app,
    PUBLIC_DATABASE_URL: urls.public,
    MIGRATE_DATABASE_URL: urls.owner,
    MEILI_HOST: `http://127.0.0.1:${await anyFreePort()}`,
    MEILI_API_KEY: apiKey,
    LOG_LEVEL: "warn",
  };
  adoptEnvironment({ ...environment, LOG_LEVEL: "silent" });
  owner = connect(urls.owner);
  app = connect(urls.app);
  from = outletOf(app, environment.MEILI_HOST ?? "", apiKey);
});
afterEach(async () => {
  await Promise.all(running.map((each) => each.kill()));
  running = [];
  await Promise.all([owner.destroy(), app.destroy(), closeDbs()]);
  await dropDatabase(cluster.adminUrl, "faults");
});

async function startEverything(): Promise<{ service: StartedProcess; sender: StartedProcess }> {
  const service = startService();
  expect(await serviceAnswers()).toBe(true);
  const sender = startSender();
  expect(await holds(agrees)).toBe(true);
  return { service, sender };
}

const renameAll = (to: string) => owner("design").update({ name: to });
const waitingCount = async (): Promise<number> => (await searchCounts(app)).waiting;

test("the sender killed while it sends changes", async () => {
  const { sender } = await startEverything();
  await renameAll("Renamed once");
  expect(await holds(async () => (await waitingCount()) < entries)).toBe(true);
  await sender.kill();
  expect(await waitingCount(), "killed before it was done").toBeGreaterThan(0);
  await owner("published_entry").whereRaw("entry_id::text like '%7'").delete();
  startSender();
  expect(await holds(agrees)).toBe(true);
});

test("the sender killed while it rebuilds; readers see no less meanwhile, and the next one goes on", async () => {
  const { sender } = await startEverything();
  await askForRebuild(app);
  expect(await holds(async () => ((await searchBuild(app))?.sent ?? 0) > 0)).toBe(true);
  await sender.kill();
  const build = await searchBuild(app);
  expect(build, "killed before it was done").toBeDefined();
  const { numberOfDocuments } = await from.client().index(DESIGNS_INDEX).getStats();
  expect(numberOfDocuments).toBe(entries);
  await renameAll("Renamed in a rebuild");
  startSender();
  expect(await holds(agrees)).toBe(true);
});

test("the service killed while the sender rebuilds: it comes back empty and is filled", async () => {
  const { service } = await startEverything();
  await askForRebuild(app);
  expect(await holds(async () => ((await searchBuild(app))?.sent ?? 0) > 0)).toBe(true);
  await service.kill();
  await renameAll("Renamed while the service was away");
  startService();
  expect(await serviceAnswers()).toBe(true);
  expect(await holds(agrees)).toBe(true);
});

test("a publication killed before it commits leaves no trace; one that commits is found", async () => {
  await startEverything();
  const gone: { entry_id: string }[] = await owner("published_entry").orderBy("entry_id").limit(50).select("entry_id");
  const ids = gone.map((row) => row.entry_id);
  await owner.raw("create table kept as select * from published_entry where entry_id = any (?)", [ids]);
  await owner.raw("grant select on kept to fanfold_app");
  await owner("published_entry").whereIn("entry_id", ids).delete();
  expect(await holds(agrees)).toBe(true);
  const found = async (): Promise<number> => (await from.client().index(DESIGNS_INDEX).getStats()).numberOfDocuments;
  expect(await found()).toBe(entries - 50);
  const cut = start("tests/faults/search-publish.ts", "stop");
  await cut.says("written");
  await cut.kill();
  expect(await holds(agrees)).toBe(true);
  expect(await found()).toBe(entries - 50);
  const whole = start("tests/faults/search-publish.ts", "commit");
  await whole.says("committed");
  await whole.kill();
  expect(await holds(agrees)).toBe(true);
  expect(await found()).toBe(entries);
});

test("two senders on one database: when the one that sends is killed the other takes over", async () => {
  const { sender } = await startEverything();
  startSender();
  await renameAll("Renamed before the change of senders");
  await sender.kill();
  expect(await holds(agrees)).toBe(true);
});
