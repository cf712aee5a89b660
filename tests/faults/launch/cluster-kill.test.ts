import { mkdirSync, rmSync, writeFileSync } from "node:fs";
import { createServer } from "node:net";
import path from "node:path";
import { afterEach, beforeEach, expect, test } from "vitest";
import { serverAccount } from "@/db/cluster/account";
import { startCluster, type Cluster } from "@/db/cluster/cluster";
import { processesIn, until } from "@/db/cluster/processes";
import { ensureDatabase, withClient } from "@/db/cluster/roles";
import { temporaryFolder } from "@/tests/setup/temporary-folder";

let folder: string;
let running: Cluster | undefined;
const pgdata = () => path.join(folder, "postgres/cluster");
// With the settings of real use: what was committed is there after a kill.
const start = async (): Promise<Cluster> => {
  running = await startCluster({ folder, account: serverAccount() });
  return running;
};

beforeEach(() => {
  folder = temporaryFolder("kill");
});
afterEach(async () => {
  await running?.stop();
  expect(processesIn(pgdata()), "no server process is left").toEqual([]);
  rmSync(folder, { recursive: true, force: true });
});

async function note(cluster: Cluster, text: string): Promise<string[]> {
  await ensureDatabase(cluster.adminUrl, "kept");
  return withClient(cluster.urls("kept").owner, async (client) => {
    await client.query("create table if not exists note (text text)");
    await client.query("insert into note values ($1)", [text]);
    const found = await client.query("select text from note order by text");
    return found.rows.map((row: { text: string }) => row.text);
  });
}

test("a server whose launcher was killed is found, ended, and its data taken over", async () => {
  const first = await start();
  expect(await note(first, "a")).toEqual(["a"]);
  const second = await start();
  expect(second.pid).not.toBe(first.pid);
  expect(processesIn(pgdata())).not.toContain(first.pid);
  expect(await note(second, "b")).toEqual(["a", "b"]);
});

test("after the server itself is killed the next start recovers what was written", async () => {
  const first = await start();
  await note(first, "a");
  process.kill(first.pid, "SIGKILL");
  await first.ended;
  expect(await note(await start(), "b")).toEqual(["a", "b"]);
});

test("a pid file whose number is another program's by now does not stop the start", async () => {
  const first = await start();
  await note(first, "a");
  await first.stop();
  writeFileSync(path.join(pgdata(), "postmaster.pid"), `${process.pid}\n${pgdata()}\n`);
  expect(await note(await start(), "b")).toEqual(["a", "b"]);
});

test("a port that something else took meanwhile is left to it", async () => {
  const first = await start();
  const { port } = first;
  await first.stop();
  const other = createServer();
  await new Promise<void>((resolve) => other.listen(port, "127.0.0.1", resolve));
  try {
    expect((await start()).port).not.toBe(port);
  } finally {
    await new Promise((resolve) => other.close(resolve));
  }
});

test("a cluster that was cut off while it was made is made anew", async () => {
  mkdirSync(path.join(folder, "postgres/cluster.partial"), { recursive: true });
  writeFileSync(path.join(folder, "postgres/cluster.partial/PG_VERSION"), "15\n");
  expect(await note(await start(), "a")).toEqual(["a"]);
});

test("stopping leaves no process, and stopping twice is no error", async () => {
  const cluster = await start();
  await cluster.stop();
  await cluster.stop();
  expect(await until(() => processesIn(pgdata()).length === 0, 1_000)).toBe(true);
});
