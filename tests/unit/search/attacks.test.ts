import { request } from "node:http";
import { afterAll, beforeAll, describe, expect, test } from "vitest";
import { clientOf } from "../../setup/search-service";
import { type StandIn, startSearchStandIn } from "@/search/stand-in/server";

/**
 * Requests made to hurt. What each must be answered with is the service's error object (its documentation, "Errors":
 * exactly message, code, type and link) or the right answer; a server that hangs or falls runs into the time limit.
 */
const LIMIT_MS = 60_000;
const masterKey = "attack-test-key";
let standIn: StandIn;

beforeAll(async () => {
  standIn = await startSearchStandIn({ port: 0, masterKey });
  await client()
    .index("open")
    .updateSettings({ filterableAttributes: ["*"] });
  await client()
    .index("open")
    .addDocuments(
      Array.from({ length: 50 }, (_, id) => ({ id, size: id, name: `fan ${id}` })),
      { primaryKey: "id" },
    )
    .waitTask();
});
afterAll(() => standIn.close());

const client = () => clientOf(standIn.url, masterKey);
const headers = { authorization: `Bearer ${masterKey}`, "content-type": "application/json" };

async function post(path: string, text: string, method = "POST"): Promise<{ status: number; body: Answer }> {
  const answer = await fetch(standIn.url + path, { method, headers, body: text });
  return { status: answer.status, body: (await answer.json()) as Answer };
}
type Answer = Record<string, unknown> & { code?: string; taskUid?: number; estimatedTotalHits?: number };
const search = (body: Record<string, unknown>) => post("/indexes/open/search", JSON.stringify(body));

function expectRefusal({ status, body }: { status: number; body: Answer }, code: string): void {
  expect({ status, code: body.code }).toEqual({ status: 400, code });
  expect(Object.keys(body).sort()).toEqual(["code", "link", "message", "type"]);
  expect(body.type).toBe("invalid_request");
  expect(body.link).toBe(`https://docs.meilisearch.com/errors#${code}`);
}

describe("names that every object inherits", () => {
  test("are fields like others where a document holds them, and absent where none does", async () => {
    const inherited = '{"id":"own","__proto__":"evil","constructor":"builder","toString":["text"]}';
    const { body } = await post("/indexes/names/documents?primaryKey=id", `[${inherited},{"id":"none"}]`);
    await client().tasks.waitForTask(Number(body.taskUid));
    await client()
      .index("names")
      .updateSettings({ filterableAttributes: ["*"], sortableAttributes: ["constructor"] })
      .waitTask();
    const kept = await (await fetch(`${standIn.url}/indexes/names/documents/own`, { headers })).text();
    expect(kept).toBe(inherited);
    const { hits, facetDistribution } = await client()
      .index("names")
      .search("", {
        filter: "constructor EXISTS AND __proto__ = evil",
        facets: ["__proto__", "constructor", "toString", "hasOwnProperty"],
        sort: ["constructor:asc"],
      });
    expect(hits).toHaveLength(1);
    expect(JSON.stringify(facetDistribution)).toBe(
      '{"__proto__":{"evil":1},"constructor":{"builder":1},"toString":{"text":1}}',
    );
  });

  test.each(["constructor", "__proto__", "toString"])("%s is no parameter and no setting", async (name) => {
    expectRefusal(await post("/indexes/open/search", `{"${name}":1}`), "bad_request");
    expectRefusal(await post("/indexes/open/settings", `{"${name}":1}`, "PATCH"), "bad_request");
    const address = await fetch(`${standIn.url}/indexes/open/search?${name}=1`, { headers });
    expect(address.status).toBe(400);
  });

  test("a token signed by such a name is no token", async () => {
    const part = (value: unknown): string => Buffer.from(JSON.stringify(value)).toString("base64url");
    const { results } = await client().getKeys();
    const body = part({ apiKeyUid: results[0]?.uid, searchRules: ["*"] });
    const authorization = `Bearer ${part({ alg: "constructor" })}.${body}.x`;
    const answer = await fetch(`${standIn.url}/indexes/open/search`, { headers: { authorization } });
    expect(answer.status).toBe(403);
  });
});

describe("numbers out of range", () => {
  test.each([-1, 1.5, 1e308])("%s is no offset, limit, page or number of hits", async (value) => {
    expectRefusal(await search({ offset: value }), "invalid_search_offset");
    expectRefusal(await search({ limit: value }), "invalid_search_limit");
    expectRefusal(await search({ page: value }), "invalid_search_page");
    expectRefusal(await search({ hitsPerPage: value }), "invalid_search_hits_per_page");
    expectRefusal(await post("/indexes/open/documents/fetch", `{"offset":${value}}`), "invalid_document_offset");
  });
});

describe("sheer size", () => {
  test(
    "filters: conditions without end, values without end, a digit string that is no number",
    async () => {
      const all = Array.from({ length: 150_000 }, (_, i) => i);
      const endless = all.map((i) => `size = ${i}`);
      expectRefusal(await search({ filter: endless.join(" OR ") }), "invalid_search_filter");
      expectRefusal(await search({ filter: [endless] }), "invalid_search_filter");
      expect((await search({ filter: `size IN [${all.join(",")}]` })).body.estimatedTotalHits).toBe(50);
      expect((await search({ filter: `size = ${"1".repeat(300_000)}x` })).body.estimatedTotalHits).toBe(0);
      expectRefusal(await search({ filter: `size = "${"a".repeat(1_000_000)}` }), "invalid_search_filter");
    },
    LIMIT_MS,
  );

  test("nesting: of brackets, of NOT, of arrays, of JSON", async () => {
    const deep = 100_000;
    const nested = `${"(".repeat(deep)}size = 1${")".repeat(deep)}`;
    expectRefusal(await search({ filter: nested }), "invalid_search_filter");
    expectRefusal(await search({ filter: `${"NOT ".repeat(deep)}size = 1` }), "invalid_search_filter");
    expectRefusal(await search({ filter: [[["size = 1"]]] }), "invalid_search_filter");
    const brackets = `${"[".repeat(deep)}${"]".repeat(deep)}`;
    expectRefusal(await post("/indexes/open/search", brackets), "malformed_payload");
    expectRefusal(await post("/indexes/open/documents", `{"id":1,"a":${brackets}}`), "malformed_payload");
  });

  test(
    "texts: words without end, quotes without end, one endless word",
    async () => {
      expect((await search({ q: "fan ".repeat(500_000) })).body.estimatedTotalHits).toBe(50);
      expect((await search({ q: '"'.repeat(500_000) })).status).toBe(200);
      expect((await search({ q: "a".repeat(500_000) })).status).toBe(200);
      expect((await search({ q: "\ud800 \u0000 ﷺ 👩‍👩‍👧 é̂́", attributesToHighlight: ["*"] })).status).toBe(200);
    },
    LIMIT_MS,
  );

  test(
    "documents: millions of letters without a space, a long array, thousands of fields",
    async () => {
      const index = client().index("large");
      const fields = (count: number) => Array.from({ length: count }, (_, i) => [`field${i}`, "same word"]);
      const write = (document: Record<string, unknown>) =>
        index.addDocuments([document], { primaryKey: "id" }).waitTask({ timeout: LIMIT_MS });
      await index.updateFilterableAttributes(["tags"]);
      expect((await write({ id: 1, text: `${"ﷺ".repeat(2_000_000)} end` })).status).toBe("succeeded");
      expect((await write({ id: 2, tags: Array.from({ length: 200_000 }, (_, i) => i) })).status).toBe("succeeded");
      expect((await write({ id: 3, ...Object.fromEntries(fields(20_000)) })).status).toBe("succeeded");
      expect((await write({ id: 4, ...Object.fromEntries(fields(66_000)) })).error?.code).toBe(
        "max_fields_limit_exceeded",
      );
      expect((await index.search("end")).estimatedTotalHits).toBe(1);
      expect((await index.search("same", { attributesToSearchOn: ["field19999"] })).estimatedTotalHits).toBe(1);
      expect((await index.search("", { filter: "tags = 199999" })).estimatedTotalHits).toBe(1);
    },
    LIMIT_MS * 2,
  );

  test("a multi-search of a hundred thousand queries", async () => {
    const queries = Array.from({ length: 100_000 }, () => ({ indexUid: "open" }));
    expectRefusal(await post("/multi-search", JSON.stringify({ queries })), "bad_request");
  });
});

test.each(["//", "http://["])("an address that is none (%s) is unknown, not an error of the server", async (path) => {
  const { port } = new URL(standIn.url);
  const status = await new Promise<number | undefined>((resolve, reject) => {
    const sent = request({ host: "127.0.0.1", port, path, headers }, (answer) => {
      answer.resume();
      resolve(answer.statusCode);
    });
    sent.on("error", reject).end();
  });
  expect(status).toBe(404);
});
