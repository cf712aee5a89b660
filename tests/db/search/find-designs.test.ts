import { createServer } from "node:http";
import type { AddressInfo } from "node:net";
import { afterAll, beforeAll, describe, expect, test } from "vitest";
import { indexQuerySchema, sortKeys, type IndexAnswer, type IndexQuery } from "@/lib/contracts/index-query";
import { adoptEnvironment } from "@/lib/env/env";
import { findDesigns } from "@/lib/server/reading/find-designs";
import { listDesigns } from "@/lib/server/reading/list-designs";
import { startSearchStandIn, type StandIn } from "@/search/stand-in/server";
import { setUpDatabase } from "@/tests/setup/database";
import { layOutField, outletOf, settle } from "@/tests/setup/search-field";

const database = setUpDatabase();
const apiKey = "find-designs-key";
let standIn: StandIn;

beforeAll(async () => {
  await layOutField(database.owner, 1_000);
  standIn = await startSearchStandIn({ port: 0, masterKey: apiKey });
  adoptEnvironment({ MEILI_HOST: standIn.url, MEILI_API_KEY: apiKey, LOG_LEVEL: "silent" });
  await settle(outletOf(database.app, standIn.url, apiKey));
});
afterAll(() => standIn.close());

const ask = (more: Record<string, unknown> = {}): IndexQuery => indexQuerySchema.parse(more);
const compared = ({ from: _from, highlights: _highlights, ...answer }: IndexAnswer) => answer;

/** The database's answer is the check: it was written apart from the service's and counts with SQL. */
async function bothAnswer(query: IndexQuery): Promise<IndexAnswer> {
  const [search, own] = [await findDesigns(query), await listDesigns(query)];
  expect([search.from, own.from]).toEqual(["search", "database"]);
  expect(compared(search)).toEqual(compared(own));
  return search;
}

describe("the search service and the database give the same totals, counts and order", () => {
  test("without any choice", async () => {
    const answer = await bothAnswer(ask());
    expect([answer.total, answer.ofAll, answer.pages]).toEqual([1_000, 1_000, 50]);
    expect(answer.facets.stages?.length).toBeGreaterThan(1);
    expect(answer.facets.designer?.length).toBeGreaterThan(20);
    expect(answer.histograms.gap?.length).toBeGreaterThan(10);
  });

  test.each([
    { facets: { stages: ["2"] } },
    { facets: { stages: ["1", "2"], inlet: ["bellmouth", "cone"], frame: ["120x25"] } },
    { facets: { material: ["PETG"], shroud: ["true"], spacer: ["false"] } },
    { facets: { blades2: ["7", "9"], tone: ["true"] } },
    { facets: { season: ["season-1"] } },
    { facets: { material: ['PETG" OR material = "PLA'] } },
    { facets: { hand: ["nothing"] } },
    { ranges: { gap: { low: 0.5, high: 1 } } },
    { ranges: { ratio: { low: null, high: 100 }, mass: { low: 30, high: null } }, facets: { rotation: ["counter"] } },
    { facets: { season: ["season-2"] }, ranges: { equal: { low: -4, high: 0 }, loudness: { low: 1, high: 6 } } },
    { ranges: { equal: { low: -4, high: 0 } } },
    { page: 3, facets: { struts: ["4"] } },
    { page: 9_999 },
  ] satisfies Partial<IndexQuery>[])("%j", async (query) => {
    await bothAnswer(ask(query));
  });

  test.each(
    sortKeys
      .filter((key) => key !== "match")
      .flatMap((sort) => [false, true].map((descending) => ({ sort, descending }))),
  )("sorted by $sort, descending $descending, over several benches and over one", async (order) => {
    await bothAnswer(ask(order));
    await bothAnswer(ask({ ...order, facets: { season: ["season-1"] }, page: 2 }));
  });

  test("for a designer's handle that stands in no other", async () => {
    const { facets } = await listDesigns(ask());
    const handle = facets.designer?.[0]?.value ?? "";
    const answer = await bothAnswer(ask({ facets: { designer: [handle] } }));
    expect(answer.items.every((item) => item.designers.includes(handle))).toBe(true);
  });
});

test("a season's title finds its entries in the service, and in the database while that is away", async () => {
  const { total, items } = await listDesigns(ask({ facets: { season: ["season-1"] } }));
  const title = items[0]?.seasonTitle ?? "";
  const [first = "", ...rest] = title.split(" ");
  // Letter by letter: the middle of a word will do.
  const letters = { q: `${first.slice(1, 4)} ${rest.join(" ")}`, facets: { season: ["season-1"] } };
  expect((await findDesigns(ask({ q: title, facets: { season: ["season-1"] } }))).total).toBe(total);
  expect((await listDesigns(ask(letters))).total).toBe(total);
  expect((await listDesigns(ask({ q: title, facets: { season: ["season-2"] } }))).total).toBeLessThan(
    (await listDesigns(ask({ facets: { season: ["season-2"] } }))).total,
  );
});

test("typed words are found with an error in them, and marked in pieces", async () => {
  const [item] = (await listDesigns(ask())).items;
  const word = item?.name.split(" ")[0] ?? "";
  const wrong = `${word.slice(0, 2)}${word[3] ?? ""}${word[2] ?? ""}${word.slice(4)}`;
  const answer = await findDesigns(ask({ q: wrong }));
  const marked = Object.values(answer.highlights ?? {}).flatMap((fields) => fields.name ?? []);
  expect(marked.some((piece) => piece.hit && piece.text === word)).toBe(true);
});

test("what is no longer public isn't shown nor counted on the page, though the index has not heard of it", async () => {
  const query = ask({ sort: "published" });
  const before = await findDesigns(query);
  const gone = before.items[0]?.entryId;
  const row = await database.owner("published_entry").where({ entry_id: gone }).first();
  await database.owner("published_entry").where({ entry_id: gone }).delete();
  const after = await findDesigns(query);
  expect(after.from).toBe("search");
  expect(after.items.map((item) => item.entryId)).not.toContain(gone);
  expect(after.total).toBe(before.total - 1);
  await database.owner("published_entry").insert(row);
});

test("without the service the database answers, and says so", async () => {
  adoptEnvironment({ MEILI_HOST: "http://127.0.0.1:1" });
  const answer = await findDesigns(ask());
  expect([answer.from, answer.total]).toEqual(["database", 1_000]);
  adoptEnvironment({ MEILI_HOST: standIn.url, MEILI_API_KEY: "not the key" });
  expect((await findDesigns(ask())).from).toBe("database");
  adoptEnvironment({ MEILI_API_KEY: apiKey });
  expect((await findDesigns(ask())).from).toBe("search");
});

test("an inlet stack is found by its word in the database too", async () => {
  const { facets } = await listDesigns(ask());
  const bellmouths = facets.inlet?.find(({ value }) => value === "bellmouth")?.count;
  expect((await listDesigns(ask({ q: "bellmouth" }))).total).toBeGreaterThanOrEqual(bellmouths ?? Infinity);
});

test("a service that hangs is waited for once, not at every choice, and asked again after a while", async () => {
  let asked = 0;
  const hanging = createServer(() => void asked++).listen(0, "127.0.0.1");
  await new Promise((resolve) => hanging.once("listening", resolve));
  adoptEnvironment({ MEILI_HOST: `http://127.0.0.1:${(hanging.address() as AddressInfo).port}` });
  try {
    expect((await findDesigns(ask())).from).toBe("database");
    expect(asked).toBe(1);
    for (let choice = 0; choice < 3; choice++) expect((await findDesigns(ask())).from).toBe("database");
    expect(asked).toBe(1);
  } finally {
    hanging.closeAllConnections();
    hanging.close();
    adoptEnvironment({ MEILI_HOST: standIn.url, MEILI_API_KEY: apiKey });
  }
  await expect.poll(async () => (await findDesigns(ask())).from, { timeout: 15_000 }).toBe("search");
});
