import { afterAll, beforeAll, describe, expect, test } from "vitest";
import { Meilisearch } from "meilisearch";
import { generateTenantToken } from "meilisearch/token";
import { clientOf } from "../../setup/search-service";
import { readCsv } from "@/search/stand-in/read-csv";
import { type StandIn, startSearchStandIn } from "@/search/stand-in/server";

const masterKey = "access-test-key";
let standIn: StandIn;
let client: Meilisearch;
beforeAll(async () => {
  standIn = await startSearchStandIn({ port: 0, masterKey });
  client = clientOf(standIn.url, masterKey);
  await client.index("mills").updateFilterableAttributes(["kind"]).waitTask();
  const mills = [1, 2, 3].map((id) => ({ id, kind: id === 1 ? "open" : "kept" }));
  await client.index("mills").addDocuments(mills).waitTask();
});
afterAll(() => standIn.close());

/* The tokens are made by the service's own client, so that form and signature (RFC 7519, RFC 7515) come from outside. */
describe("tokens that a key's holder makes for others", () => {
  const withToken = async (more: Record<string, unknown>) => {
    const { results } = await client.getKeys();
    const parent = results.find((key) => key.name === "Default Search API Key");
    if (parent === undefined) throw new Error("the server has no search key");
    const token = await generateTenantToken({ apiKey: parent.key, apiKeyUid: parent.uid, ...more });
    return new Meilisearch({ host: standIn.url, apiKey: token }).index("mills");
  };

  test("search what their rules cover, and no more", async () => {
    expect((await (await withToken({})).search()).hits).toHaveLength(3);
    expect((await (await withToken({ searchRules: { "mil*": null } })).search()).hits).toHaveLength(3);
    for (const searchRules of [[], { posts: null }]) {
      await expect((await withToken({ searchRules })).search()).rejects.toHaveProperty("cause.code", "invalid_api_key");
    }
  });

  test("the narrowest rule's filter is always applied, whatever is asked", async () => {
    const index = await withToken({ searchRules: { "*": null, mills: { filter: "kind = open" } } });
    expect((await index.search()).hits).toEqual([{ id: 1, kind: "open" }]);
    expect((await index.search("", { filter: "kind = kept" })).hits).toEqual([]);
    expect((await index.searchForFacetValues({ facetName: "kind" })).facetHits).toEqual([{ value: "open", count: 1 }]);
  });

  test("do nothing but search", async () => {
    await expect((await withToken({})).getStats()).rejects.toHaveProperty("cause.code", "invalid_api_key");
  });

  test("run out", async () => {
    await expect((await withToken({ expiresAt: 977_023_440 })).search()).rejects.toHaveProperty(
      "message",
      expect.stringMatching(/^Tenant token expired\. Was valid up to `977023440` and we're now `\d+`\.$/),
    );
  });

  test("a token changed by hand is no token", async () => {
    const { results } = await client.getKeys();
    const parent = results.find((key) => key.name === "Default Search API Key");
    const token = await generateTenantToken({ apiKey: "not-the-key", apiKeyUid: parent?.uid ?? "" });
    const index = new Meilisearch({ host: standIn.url, apiKey: token }).index("mills");
    await expect(index.search()).rejects.toHaveProperty("cause.code", "invalid_api_key");
  });
});

describe("tables of documents", () => {
  test("quotes, doubled quotes and line ends inside fields (RFC 4180, section 2, rules 5 to 7)", () => {
    expect(readCsv('aaa,bbb\r\n"b\r\nb","say ""so"""\r\n', ",")).toEqual([{ aaa: "b\r\nb", bbb: 'say "so"' }]);
  });

  test("a column tells its kind, and an empty field is null (the service's documentation of CSV)", () => {
    expect(readCsv("id:number;open:boolean;name\n1;true;\n2.5;;a", ";")).toEqual([
      { id: 1, open: true, name: null },
      { id: 2.5, open: null, name: "a" },
    ]);
    expect(() => readCsv("id:number\nx", ",")).toThrow(/Error parsing number "x" at line 2/);
    expect(() => readCsv("a,b\n1", ",")).toThrow(/malformed/);
  });

  test("are taken by address and type, and the delimiter by tables only", async () => {
    const index = client.index("tables");
    const send = (type: string) => index.addDocumentsFromString("id;n\n1;a", type as never, { csvDelimiter: ";" });
    expect((await send("text/csv").waitTask()).status).toBe("succeeded");
    expect((await index.getDocuments()).results).toEqual([{ id: "1", n: "a" }]);
    await expect(send("application/json")).rejects.toHaveProperty("cause.code", "invalid_content_type");
  });
});

test("batches: every task is one of its own", async () => {
  const { results } = await client.batches.getBatches({ indexUids: ["mills"], limit: 1 });
  const [batch] = results;
  expect(batch?.stats).toMatchObject({ totalNbTasks: 1, status: { succeeded: 1 }, indexUids: { mills: 1 } });
  expect(await client.batches.getBatch(batch?.uid ?? -1)).toEqual(batch);
  await expect(client.batches.getBatch(987_654)).rejects.toHaveProperty("cause.code", "batch_not_found");
});
