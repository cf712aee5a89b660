import { fork } from "node:child_process";
import path from "node:path";
import { anyFreePort } from "@/db/cluster/port";
import { ensureDatabase } from "@/db/cluster/roles";
import { connect, type Handle } from "@/db/client/connect";
import { closeDbs } from "@/db/client/handles";
import { migrateEverything } from "@/lib/cli/migrate";
import { fillField } from "@/lib/cli/demo/fill/fill-field";
import { facetKeys, indexQuerySchema, type IndexQuery } from "@/lib/contracts/index-query";
import { seedBench } from "@/db/seeds/demo/seed-bench";
import { seedPeople } from "@/db/seeds/demo/seed-people";
import { adoptEnvironment, childEnvironment } from "@/lib/env/env";
import { askForRebuild } from "@/db/queries/search-build";
import { createRandom } from "@/lib/science/statistics/random";
import { reindex } from "@/lib/server/search/reindex";
import { createSearchClient } from "@/search/client";
import { indexFilter, searchDesigns } from "@/search/query";
import { DESIGNS_INDEX } from "@/search/settings";
import { outletOf } from "../setup/search-field";
import { temporaryCluster } from "../setup/temporary-cluster";
import type { BenchResult } from "./log";
import { quantiles } from "./quantiles";

/** Sizes in published entries; each grows from the one before. */
const defaultSizes = [1_000, 10_000, 100_000];
const questions = 60;
const root = path.resolve(import.meta.dirname, "../..");
const apiKey = "bench-index-query-key";

/**
 * The index page's question (two filters, all facets and histograms, a sort, one page; with and without typed words)
 * against the bare SQL count of the same page and against the same search without facets. One process asks, the
 * stand-in answers in another, the database in a third; times are of the asking process.
 *
 * @param sizes how many published entries, rising
 */
export async function run(sizes: readonly number[] = defaultSizes): Promise<BenchResult[]> {
  const cluster = await temporaryCluster();
  const host = `http://127.0.0.1:${await anyFreePort()}`;
  const service = fork(path.join(root, "lib/cli/search-stand-in.ts"), {
    cwd: root,
    execArgv: ["--import", "tsx"],
    env: childEnvironment({ MEILI_HOST: host, MEILI_API_KEY: apiKey }) as NodeJS.ProcessEnv,
    stdio: ["ignore", "ignore", "inherit", "ipc"],
  });
  const gone = new Promise<void>((resolve) => service.once("exit", () => resolve()));
  try {
    await ensureDatabase(cluster.adminUrl, "bench");
    const urls = cluster.urls("bench");
    await migrateEverything(urls.owner);
    adoptEnvironment({ DATABASE_URL: urls.app, PUBLIC_DATABASE_URL: urls.public, LOG_LEVEL: "warn" });
    const owner = connect(urls.owner);
    const reader = connect(urls.public);
    try {
      await seedPeople(owner, "no password");
      await seedBench(owner);
      await untilAnswers(host, gone);
      const results: BenchResult[] = [];
      let held = 0;
      let before: { size: number; p95Ms: number } | undefined;
      for (const size of sizes) {
        await fillField(owner, { entries: size - held });
        held = size;
        await askForRebuild(owner);
        await reindex(() => undefined, outletOf(owner, host, apiKey));
        const { rows, p95Ms } = await benchSize(reader, host, size);
        results.push(...rows);
        if (before) results.push(growth(before, { size, p95Ms }));
        before = { size, p95Ms };
      }
      return results;
    } finally {
      await Promise.all([owner.destroy(), reader.destroy(), closeDbs()]);
    }
  } finally {
    service.kill("SIGTERM");
    await gone;
    await cluster.stop();
  }
}

/** How the p95 without words grows, as a part of how the number of entries grows: below 1 is below linear. */
function growth(before: { size: number; p95Ms: number }, now: { size: number; p95Ms: number }): BenchResult {
  return {
    name: `index query without words, growth from ${before.size} to ${now.size} entries against linear growth`,
    ratio: now.p95Ms / before.p95Ms / (now.size / before.size),
    goal: 1,
    detail: `p95 ${before.p95Ms.toFixed(1)} ms, then ${now.p95Ms.toFixed(1)} ms`,
  };
}

async function untilAnswers(host: string, gone: Promise<void>): Promise<void> {
  let ended = false;
  void gone.then(() => (ended = true));
  const client = createSearchClient({ host, apiKey });
  while (!(await client.isHealthy())) {
    if (ended) throw new Error("the search stand-in ended");
    await new Promise((resolve) => setTimeout(resolve, 100));
  }
}

/** Questions as readers put them: two facets with a choice or two, a bound now and then, a sort. */
function drawQuestions(size: number, words: readonly string[]): IndexQuery[] {
  const random = createRandom(size);
  const pick = <T>(from: readonly [T, ...T[]]): T => from[random.below(from.length)] ?? from[0];
  return Array.from({ length: questions }, () => {
    const word = words[random.below(words.length)] ?? "";
    const shortened = random.uniform() < 0.4 && word.length > 5 ? word.slice(0, -2) : word;
    return indexQuerySchema.parse({
      q: shortened,
      facets: {
        inlet: pick([["none"], ["bellmouth"], ["cone", "bellmouth"]]),
        material: pick([["PETG"], ["PLA", "ASA"], ["PETG", "PC"]]),
      },
      sort: pick(["ratio", "level", "published", "name"]),
    });
  });
}

async function benchSize(reader: Handle, host: string, size: number): Promise<{ rows: BenchResult[]; p95Ms: number }> {
  const client = createSearchClient({ host, apiKey }, 60_000);
  const names: { name: string }[] = await reader("shown.entry").select({ name: "design_name" }).limit(500);
  const typed = drawQuestions(size, [...new Set(names.flatMap(({ name }) => name.toLowerCase().split(" ")))]);
  const browsed = typed.map((query) => ({ ...query, q: "" }));
  const count = await quantiles(browsed, (query) => sqlCount(reader, query));
  const rows = [
    { name: "without words", asked: browsed, aimMs: size === 100_000 ? 60 : undefined },
    { name: "with words", asked: typed, aimMs: size === 10_000 ? 60 : undefined },
  ];
  const results: BenchResult[] = [];
  let p95Ms = Number.NaN;
  for (const { name, asked, aimMs } of rows) {
    const full = await quantiles(asked, (query) => searchDesigns(client, query));
    if (asked === browsed) p95Ms = full.p95;
    const bare = await quantiles(asked, (query) => facetless(client, query));
    const said = `p50 ${full.p50.toFixed(1)} ms, p95 ${full.p95.toFixed(1)} ms`;
    const aim = aimMs === undefined ? "" : `; aim: p95 under ${aimMs} ms on two cores of one's own`;
    results.push(
      {
        name: `index query ${name}, ${size} entries, p95 against its bare SQL count`,
        ratio: full.p95 / count.p95,
        goal: Infinity,
        detail: `${said}; count p50 ${count.p50.toFixed(1)}, p95 ${count.p95.toFixed(1)} ms${aim}`,
      },
      {
        name: `index query ${name}, ${size} entries, p95 against a search without facets`,
        ratio: full.p95 / bare.p95,
        goal: Infinity,
        detail: `${said}; without facets p50 ${bare.p50.toFixed(1)}, p95 ${bare.p95.toFixed(1)} ms`,
      },
    );
  }
  return { rows: results, p95Ms };
}

const facetless = (client: ReturnType<typeof createSearchClient>, query: IndexQuery) =>
  client.index(DESIGNS_INDEX).search(query.q, {
    filter: indexFilter(query),
    sort: [`${query.sort}:asc`, "id:asc"],
    page: 1,
    hitsPerPage: 20,
    matchingStrategy: "all",
  });

/** What any page with a total costs at least: one count over the public view under the same choices. */
async function sqlCount(reader: Handle, query: IndexQuery): Promise<void> {
  const counted = reader("shown.entry").count("* as n");
  for (const facet of facetKeys) {
    const values = query.facets[facet];
    const column = facet === "inlet" ? "inlet_stack" : facet;
    if (values) void counted.whereIn(column, values);
  }
  await counted;
}
