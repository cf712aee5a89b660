import { randomUUID } from "node:crypto";
import { existsSync, readFileSync, rmSync } from "node:fs";
import { createServer } from "node:net";
import path from "node:path";
import { afterEach, beforeEach, expect, test, vi } from "vitest";
import { z } from "zod";
import { anyFreePort } from "@/db/cluster/port";
import { processesIn, until } from "@/db/cluster/processes";
import { lifetime } from "@/lib/cli/launch/lifetime";
import { untilHealthy } from "@/lib/cli/launch/site";
import { dataFolderOfOnesOwn } from "@/tests/setup/seeded-folder";
import { launch, marked } from "./launcher";

let folder: string;
let mark: string;
let port: number;
const settings = (more: Record<string, string> = {}) => ({ PORT: String(port), DATA_DIR: folder, ...more });
const database = () => processesIn(path.join(folder, "postgres/cluster"));

beforeEach(async () => {
  folder = dataFolderOfOnesOwn("start");
  mark = randomUUID();
  port = await anyFreePort();
});
afterEach(async () => {
  await until(() => marked(mark).length + database().length === 0, 5_000);
  expect([...marked(mark), ...database()], "no process is left").toEqual([]);
  rmSync(folder, { recursive: true, force: true });
});

const patience = { timeout: 120_000, interval: 200 };
const healthy = async (): Promise<number> => (await fetch(`http://127.0.0.1:${port}/api/v1/health`)).status;

test("a start answers, a second one beside it is refused, and SIGTERM ends all of it with exit code 0", async () => {
  const first = launch(settings(), mark);
  await first.ready;
  expect(await healthy()).toBe(200);
  const second = launch(settings({ PORT: String(await anyFreePort()) }), mark);
  expect(await second.ended).toBe(1);
  expect(second.said()).toContain(`already runs from ${folder}`);
  expect(await healthy()).toBe(200);
  first.signal("SIGTERM");
  expect(await first.ended).toBe(0);
});

test("what a killed launcher left running is ended by the next start, which serves in its place", async () => {
  const first = launch(settings(), mark);
  await first.ready;
  first.signal("SIGKILL");
  expect(await first.ended).toBe("SIGKILL");
  expect(database().length).toBeGreaterThan(0);
  const second = launch(settings(), mark);
  await second.ready;
  expect(second.said(), "the demo is seeded once").not.toContain("Seeding");
  expect(await healthy()).toBe(200);
  second.signal("SIGINT");
  expect(await second.ended).toBe(0);
});

test("the search, the worker, the site and the database are started again when they are killed, and answer as before", async () => {
  const start = launch(settings(), mark);
  await start.ready;
  const address = `http://127.0.0.1:${port}`;
  const listed = async () => {
    const answer = await fetch(`${address}/api/v1/designs`);
    return (await answer.json()) as { from: string; total: number };
  };
  const before = await listed();
  const { children } = z
    .object({ children: z.array(z.object({ pid: z.int(), name: z.string() })) })
    .parse(JSON.parse(readFileSync(path.join(folder, "launcher.json"), "utf8")));
  const kill = (name: string) =>
    process.kill(children.findLast((each) => each.name === name)?.pid ?? Number.NaN, "SIGKILL");
  for (const name of ["search stand-in", "worker", "site"]) {
    kill(name);
    await vi.waitUntil(() => start.said().includes(`The ${name} ended (exit 1). It is started again.`), patience);
  }
  await untilHealthy(lifetime(), address);
  // The search came back empty: until the worker has filled it again the list comes from the database.
  const after = await vi.waitUntil(async () => {
    const now = await listed();
    return now.from === "search" && now;
  }, patience);
  expect(after.total).toBe(before.total);
  kill("database");
  await vi.waitUntil(() => start.said().includes("The database ended. It is started again."), patience);
  await untilHealthy(lifetime(), address);
  // A sheet is read from the database alone.
  const sheet = (await (await fetch(`${address}/api/v1/designs`)).json()) as { items: { slug: string }[] };
  expect((await fetch(`${address}/api/v1/sheets/${sheet.items[0]?.slug}`)).status).toBe(200);
  start.signal("SIGTERM");
  expect(await start.ended).toBe(0);
});

test("a start that is stopped on its way leaves nothing, and says by its code that it was", async () => {
  const early = launch(settings(), mark);
  await until(() => database().length > 0, 60_000);
  early.signal("SIGTERM");
  expect(await early.ended).toBe(143);
});

test("a taken port is named, and nothing is left", async () => {
  const other = createServer();
  await new Promise<void>((resolve) => other.listen(port, "127.0.0.1", resolve));
  try {
    const start = launch(settings(), mark);
    expect(await start.ended).toBe(1);
    expect(start.said()).toContain(`Port ${port} of 127.0.0.1 is taken`);
  } finally {
    await new Promise((resolve) => other.close(resolve));
  }
});

test("the demo is not shown beyond this machine", async () => {
  const start = launch(settings({ HOST: "0.0.0.0" }), mark);
  expect(await start.ended).toBe(1);
  expect(start.said()).toContain("HOST=0.0.0.0");
  expect(existsSync(path.join(folder, "launcher.json"))).toBe(false);
});

test("with DATABASE_URL set, nothing of ours is started and what is missing is named", async () => {
  const start = launch(settings({ DATABASE_URL: "postgresql://a:b@127.0.0.1:1/none" }), mark);
  expect(await start.ended).toBe(1);
  expect(start.said()).toContain("PUBLIC_DATABASE_URL, MEILI_HOST, SMTP_URL, NEXTAUTH_SECRET, NEXTAUTH_URL");
  expect(existsSync(path.join(folder, "launcher.json"))).toBe(false);
});
