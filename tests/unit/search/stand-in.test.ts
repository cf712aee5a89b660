import { afterAll, afterEach, beforeAll, describe, expect, test, vi } from "vitest";
import { clientOf } from "../../setup/search-service";
import { INDEX_SETTINGS, RANGE_FIELDS, SCALED_FIELDS, SCALE_FIELD, binStart } from "@/search/settings";
import { type StandIn, startSearchStandIn } from "@/search/stand-in/server";

const masterKey = "stand-in-test-key";
let standIn: StandIn;
beforeAll(async () => {
  standIn = await startSearchStandIn({ port: 0, masterKey });
  await clientOf(standIn.url, masterKey).createIndex("refusals").waitTask();
});
afterAll(() => standIn.close());
afterEach(() => {
  vi.unstubAllEnvs();
});

const ask = (path: string, body?: unknown, method = body === undefined ? "GET" : "POST") =>
  fetch(standIn.url + path, {
    method,
    headers: { authorization: `Bearer ${masterKey}`, "content-type": "application/json" },
    ...(body === undefined ? {} : { body: JSON.stringify(body) }),
  });

describe("the stand-in keeps to its place", () => {
  test("listens on the loopback address", () => {
    expect(new URL(standIn.url).hostname).toBe("127.0.0.1");
  });

  test("refuses production unless it is told of the demonstration", async () => {
    vi.stubEnv("NODE_ENV", "production");
    await expect(startSearchStandIn({ port: 0, masterKey })).rejects.toThrow(/for development and tests/);
    const demo = await startSearchStandIn({ port: 0, masterKey, allowProduction: true });
    await demo.close();
  });

  test("refuses to run without a key, and a port that is taken", async () => {
    await expect(startSearchStandIn({ port: 0, masterKey: "" })).rejects.toThrow(/master key/);
    const port = Number(new URL(standIn.url).port);
    await expect(startSearchStandIn({ port, masterKey })).rejects.toThrow(/EADDRINUSE/);
  });
});

describe("what it doesn't do it refuses in the service's own form, and never answers wrongly", () => {
  test.each<[string, Record<string, unknown>]>([
    ["scores of several words", { q: "slow mill", showRankingScore: true }],
    ["score details of a phrase", { q: '"slow"', showRankingScoreDetails: true }],
    ["score thresholds of several words", { q: "slow mill", rankingScoreThreshold: 0.5 }],
    ["vectors", { vector: [1] }],
    ["hybrid search", { hybrid: { embedder: "default" } }],
    ["geographic sort", { sort: ["_geoPoint(1, 2):asc"] }],
    ["geographic filters", { filter: "_geoRadius(1, 2, 3)" }],
  ])("%s", async (_, body) => {
    const answer = await ask("/multi-search", { queries: [{ indexUid: "refusals", ...body }] });
    const refusal = (await answer.json()) as Record<string, string>;
    expect(answer.status).toBe(400);
    expect(Object.keys(refusal).sort()).toEqual(["code", "link", "message", "type"]);
    expect(refusal.message).toMatch(/not supported by this server\.|are not supported by this server/);
  });

  test.each<[string, string, unknown]>([
    ["POST", "/indexes/x/similar", {}],
    ["POST", "/indexes/x/documents/edit", {}],
    ["POST", "/dumps", {}],
    ["GET", "/network", undefined],
    ["POST", "/webhooks", {}],
  ])("%s %s", async (method, path, body) => {
    const answer = await ask(path, body, method);
    expect([answer.status, ((await answer.json()) as { code: string }).code]).toEqual([400, "feature_not_enabled"]);
  });

  test("federated search by anything but scores, synonyms of several words, embedders, features", async () => {
    for (const [path, body, method] of [
      ["/multi-search", { federation: {}, queries: [{ indexUid: "refusals", q: "slow", distinct: "kind" }] }, "POST"],
      ["/multi-search", { federation: { page: 1 }, queries: [] }, "POST"],
      ["/indexes/x/settings", { synonyms: { "slow mill": ["heronwing"] } }, "PATCH"],
      ["/indexes/x/settings", { embedders: { default: { source: "userProvided" } } }, "PATCH"],
      ["/experimental-features", { metrics: true }, "PATCH"],
    ] as const) {
      const answer = await ask(path, body, method);
      expect([path, answer.status]).toEqual([path, 400]);
      expect(((await answer.json()) as { message: string }).message).toMatch(/not supported by this server/);
    }
  });
});

describe("the product's settings", () => {
  test("every searched, sorted and chosen field can be used, and every absolute figure has its scale", () => {
    const filterable: readonly string[] = INDEX_SETTINGS.filterableAttributes;
    for (const { field } of RANGE_FIELDS) expect(filterable).toEqual(expect.arrayContaining([field, `${field}Bin`]));
    expect(filterable).toEqual(expect.arrayContaining([SCALE_FIELD, ...SCALED_FIELDS]));
    expect(INDEX_SETTINGS.searchableAttributes).not.toContain("*");
    expect(INDEX_SETTINGS.displayedAttributes).not.toContain("*");
    expect(INDEX_SETTINGS.rankingRules[0]).toBe("sort");
  });

  test("bins: a value on an edge opens the bin above, also where binary fractions don't meet decimals", () => {
    expect([binStart(0.3, 0.1), binStart(0.29, 0.1), binStart(-0.5, 1), binStart(-2, 1), binStart(1.15, 0.05)]).toEqual(
      [0.3, 0.2, -1, -2, 1.15],
    );
  });
});
