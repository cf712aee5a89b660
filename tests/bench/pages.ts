import { execFile } from "node:child_process";
import { randomUUID } from "node:crypto";
import { rmSync } from "node:fs";
import path from "node:path";
import { promisify } from "node:util";
import { connect } from "@/db/client/connect";
import { anyFreePort } from "@/db/cluster/port";
import { toldBy } from "@/lib/cli/launch/ledger";
import { indexAnswerSchema } from "@/lib/contracts/index-query";
import { entryToken } from "@/lib/domain/designs/entry-token";
import { childEnvironment } from "@/lib/env/env";
import { launch } from "../faults/launch/launcher";
import { temporaryFolder } from "../setup/temporary-folder";
import type { BenchResult } from "./log";
import { quantiles, type Quantiles } from "./quantiles";

const root = path.resolve(import.meta.dirname, "../..");
const requests = 25;
/** First paint of the trait study, from stored aggregates, on two cores of one's own. */
const studyAimMs = 300;

type Timed = Quantiles & { name: string; size: number };

/**
 * Pages of a running product as a reader gets them, the whole HTML: the index's first page, the index with a choice, a
 * comparison, the trait study, the home page; against one bare SQL count of what is public, and how each grows.
 *
 * @param sizes how many published entries, rising
 */
export async function benchPages(sizes: readonly number[] = [1_000, 10_000, 100_000]): Promise<BenchResult[]> {
  const folder = temporaryFolder("bench-pages");
  const port = await anyFreePort();
  const product = launch({ PORT: String(port), DATA_DIR: folder }, randomUUID());
  try {
    await product.ready;
    const address = `http://127.0.0.1:${port}`;
    const results: BenchResult[] = [];
    let before: Timed[] = [];
    for (const size of sizes) {
      await fill(folder, size);
      const { timed, count } = await timePages(folder, address, size);
      results.push(...timed.map((each) => againstCount(each, count)), ...timed.flatMap((each) => growth(each, before)));
      before = timed;
    }
    return results;
  } finally {
    product.signal("SIGTERM");
    await product.ended;
    rmSync(folder, { recursive: true, force: true });
  }
}

/** `npm run demo -- --designs N` beside the product: it ends once the index holds them. */
async function fill(folder: string, size: number): Promise<void> {
  const args = ["--import", "tsx", "lib/cli/demo.ts", "--designs", String(size)];
  const env = childEnvironment({ DATA_DIR: folder }) as NodeJS.ProcessEnv;
  await promisify(execFile)(process.execPath, args, { cwd: root, env, maxBuffer: 64 * 1024 * 1024 });
}

async function timePages(folder: string, address: string, size: number): Promise<{ timed: Timed[]; count: Quantiles }> {
  const get = async (at: string): Promise<string> => {
    const answer = await fetch(`${address}${at}`);
    if (!answer.ok) throw new Error(`${at} answered ${answer.status}`);
    return answer.text();
  };
  const { items } = indexAnswerSchema.parse(JSON.parse(await get("/api/v1/designs")));
  const pages = [
    { name: "home page", at: "/" },
    { name: "index, first page", at: "/designs" },
    { name: "index, two choices and a sort", at: "/designs?inlet=bellmouth&material=PETG&sort=-level" },
    { name: "comparison of two", at: `/compare?entries=${items.slice(0, 2).map(entryToken).join(",")}` },
    { name: "trait study", at: "/traits" },
  ];
  const timed: Timed[] = [];
  for (const { name, at } of pages) {
    const asked = Array.from({ length: requests }, () => at);
    timed.push({ name, size, ...(await quantiles(asked, get)) });
  }
  const reader = connect(toldBy(folder)?.PUBLIC_DATABASE_URL ?? "");
  try {
    const asked = Array.from({ length: requests }, () => "shown.entry");
    return { timed, count: await quantiles(asked, (view) => reader(view).count("* as n")) };
  } finally {
    await reader.destroy();
  }
}

function againstCount({ name, size, p50, p95 }: Timed, count: Quantiles): BenchResult {
  const aim = name === "trait study" && size === 100_000 ? `; aim: under ${studyAimMs} ms` : "";
  return {
    name: `${name}, ${size} entries, p50 against a bare SQL count`,
    ratio: p50 / count.p50,
    goal: Infinity,
    detail: `p50 ${p50.toFixed(0)} ms, p95 ${p95.toFixed(0)} ms; count p50 ${count.p50.toFixed(1)} ms${aim}`,
  };
}

/** How a page's time grows, as a part of how the number of entries grows: below 1 is below linear. */
function growth(now: Timed, before: readonly Timed[]): BenchResult[] {
  const was = before.find(({ name }) => name === now.name);
  if (!was) return [];
  return [
    {
      name: `${now.name}, growth from ${was.size} to ${now.size} entries against linear growth`,
      ratio: now.p50 / was.p50 / (now.size / was.size),
      goal: 1,
      detail: `p50 ${was.p50.toFixed(0)} ms, then ${now.p50.toFixed(0)} ms`,
    },
  ];
}
