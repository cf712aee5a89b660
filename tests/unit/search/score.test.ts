import { afterAll, beforeAll, describe, expect, test } from "vitest";
import { clientOf } from "../../setup/search-service";
import { rulesInForce } from "@/search/stand-in/rules-in-force";
import { globalScore, positionCost } from "@/search/stand-in/score-rank";
import { type StandIn, startSearchStandIn } from "@/search/stand-in/server";

const masterKey = "score-test-key";
let standIn: StandIn;
beforeAll(async () => {
  standIn = await startSearchStandIn({ port: 0, masterKey });
  const client = clientOf(standIn.url, masterKey);
  await client.index("mills").updateFilterableAttributes(["id", "name"]).waitTask();
  const mills = [
    { id: 1, name: "Long Slow Heron", note: "A quiet mill by a heron that waits" },
    { id: 2, name: "Heron" },
    { id: 3, name: "Heron, grey" },
    { id: 4, name: "Herons of note" },
    { id: 5, name: "the herom" },
    { id: 6, name: "First. Heron" },
  ];
  await client.index("mills").addDocuments(mills).waitTask();
  await client.index("posts").updateFilterableAttributes(["name"]).waitTask();
  await client
    .index("posts")
    .addDocuments([{ id: 1, name: "Heron post" }])
    .waitTask();
});
afterAll(() => standIn.close());
const mills = () => clientOf(standIn.url, masterKey).index<{ id: number }>("mills");

/*
 * Expected figures are worked out by hand from the service's published source: ranks are joined as in
 * milli/src/score_details.rs (Rank::merge), a place costs as in ranking_rule_graph/position/mod.rs, and values as a
 * whole or from their beginning count as in exact_attribute.rs.
 */
describe("scores of one word", () => {
  test("each by its typos, its place and how exactly it stands", async () => {
    const { hits } = await mills().search("heron", { showRankingScore: true });
    // Ranks of 2 for typos, 11 for the place, 3 for the kind of match, 2 for exact words: 132 in all. The full stop parts
    // by eight, so that the sixth stands at 8, which costs 4: ((2 - 1) 11 + 7 - 1) 3 + 1 = 52, and (52 - 1) 2 + 2 = 104.
    expect(hits.map((hit) => [hit.id, Math.round((hit._rankingScore ?? 0) * 132)])).toEqual([
      [2, 132],
      [3, 130],
      [4, 127],
      [1, 116],
      [6, 104],
      [5, 55],
    ]);
  });

  test("a threshold leaves out what is below it, from hits and totals", async () => {
    const found = await mills().search("heron", { rankingScoreThreshold: 0.95, page: 1 });
    expect([found.hits.map((hit) => hit.id), found.totalHits]).toEqual([[2, 3, 4], 3]);
  });

  test("details name the rules in the order of the settings", async () => {
    const { hits } = await mills().search("heron", { showRankingScoreDetails: true });
    expect(hits[3]?._rankingScoreDetails).toEqual({
      words: { order: 0, matchingWords: 1, maxMatchingWords: 1, score: 1 },
      typo: { order: 1, typoCount: 0, maxTypoCount: 1, score: 1 },
      proximity: { order: 2, score: 1 },
      attributeRank: { order: 3, score: 1 },
      wordPosition: { order: 4, score: 9 / 11 },
      exactness: { order: 5, matchType: "noExactMatch", matchingWords: 1, maxMatchingWords: 1, score: 1 / 3 },
    });
  });

  test("without words every document scores 1", async () => {
    const { hits } = await mills().search("", { showRankingScore: true });
    expect(hits.map((hit) => hit._rankingScore)).toEqual([1, 1, 1, 1, 1, 1]);
  });

  test("ranks and places", () => {
    expect(globalScore([])).toBe(1);
    expect(globalScore([[2, 4], [3, 3]])).toBe(6 / 12); // prettier-ignore
    expect([0, 1, 2, 4, 5, 11, 12, 15, 16, 24, 25, 64, 65, 1024, 1025].map(positionCost)).toEqual([
      0, 1, 2, 2, 3, 4, 5, 5, 6, 7, 7, 7, 8, 9, 10,
    ]);
  });
});

describe("several queries as one list", () => {
  const search = (body: Record<string, unknown>) =>
    fetch(`${standIn.url}/multi-search`, {
      method: "POST",
      headers: { authorization: `Bearer ${masterKey}`, "content-type": "application/json" },
      body: JSON.stringify(body),
    }).then((answer) => answer.json() as Promise<Record<string, unknown>>);

  test("weights order them, and what two queries find counts once", async () => {
    const queries = [
      { indexUid: "mills", q: "heron", filter: "id = 2", federationOptions: { weight: 0.5 } },
      { indexUid: "posts", q: "heron" },
      { indexUid: "mills", q: "heron", filter: "id = 2", federationOptions: { weight: 0.25 } },
    ];
    const found = await search({ federation: {}, queries });
    const at = (hit: unknown) => (hit as { _federation: Record<string, unknown> })._federation;
    expect((found.hits as unknown[]).map(at)).toEqual([
      { indexUid: "posts", queriesPosition: 1, weightedRankingScore: 130 / 132 },
      { indexUid: "mills", queriesPosition: 0, weightedRankingScore: 0.5 },
    ]);
    expect(found.estimatedTotalHits).toBe(2);
  });

  test("facets by index, or added up", async () => {
    const queries = [
      { indexUid: "mills", q: "heron", filter: "id = 2" },
      { indexUid: "posts", q: "heron" },
    ];
    const facetsByIndex = { mills: ["name", "id"], posts: ["name"] };
    expect((await search({ federation: { facetsByIndex }, queries })).facetsByIndex).toEqual({
      mills: { distribution: { name: { Heron: 1 }, id: { 2: 1 } }, stats: { id: { min: 2, max: 2 } } },
      posts: { distribution: { name: { "Heron post": 1 } }, stats: {} },
    });
    const merged = await search({ federation: { facetsByIndex, mergeFacets: { maxValuesPerFacet: 1 } }, queries });
    expect(merged.facetDistribution).toEqual({ name: { Heron: 1 }, id: { 2: 1 } });
  });

  test.each([
    [{ limit: 1 }, "invalid_multi_search_query_pagination"],
    [{ facets: ["name"] }, "invalid_multi_search_query_facets"],
    [{ federationOptions: { weight: -1 } }, "invalid_multi_search_weight"],
  ])("a query may not bring %j", async (more, code) => {
    const found = await search({ federation: {}, queries: [{ indexUid: "posts", q: "heron", ...more }] });
    expect(found.code).toBe(code);
  });
});

/** Source: the engine's `get_ranking_rules_for_query_graph_search` (crates/milli/src/search/new/mod.rs). */
describe("rules that don't go together", () => {
  test.each([
    [
      ["words", "attribute", "attributeRank", "wordPosition"],
      ["words", "attribute"],
    ],
    [
      ["words", "attributeRank", "attribute", "wordPosition"],
      ["words", "attributeRank", "wordPosition"],
    ],
    [
      ["words", "wordPosition", "attribute", "typo", "typo"],
      ["words", "wordPosition", "typo"],
    ],
    [
      ["size:asc", "typo", "words"],
      ["size:asc", "words", "typo"],
    ],
  ])("%j is run as %j", (rules, run) => {
    expect(rulesInForce(rules, "last")).toEqual(run);
    expect(rulesInForce(rules, "all")).toEqual(run.filter((rule) => rule !== "words"));
  });
});
