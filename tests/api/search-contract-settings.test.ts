import { afterAll, beforeAll, beforeEach, describe, expect, test } from "vitest";
import type { Index } from "meilisearch";
import { freshIndexName, openSearchService, type SearchService } from "../setup/search-service";

let service: SearchService;
let index: Index;
beforeAll(async () => {
  service = await openSearchService();
});
afterAll(() => service.close());
beforeEach(async () => {
  index = service.client.index(freshIndexName());
  await service.client.createIndex(index.uid).waitTask();
  return async () => void (await index.delete().waitTask());
});
const code = (expected: string) => ({ cause: expect.objectContaining({ code: expected }) as unknown });

// Defaults as the service's settings reference lists them.
const DEFAULTS = {
  dictionary: [],
  displayedAttributes: ["*"],
  distinctAttribute: null,
  embedders: {},
  facetSearch: true,
  faceting: { maxValuesPerFacet: 100, sortFacetValuesBy: { "*": "alpha" } },
  filterableAttributes: [],
  localizedAttributes: null,
  nonSeparatorTokens: [],
  pagination: { maxTotalHits: 1000 },
  prefixSearch: "indexingTime",
  proximityPrecision: "byWord",
  searchCutoffMs: null,
  searchableAttributes: ["*"],
  separatorTokens: [],
  sortableAttributes: [],
  stopWords: [],
  synonyms: {},
};

describe("settings", () => {
  test("begin at their defaults and come back to them", async () => {
    expect(await index.getSettings()).toMatchObject(DEFAULTS);
    await index
      .updateSettings({ stopWords: ["the"], faceting: { maxValuesPerFacet: 7 }, searchableAttributes: ["a"] })
      .waitTask();
    expect(await index.getSettings()).toMatchObject({
      stopWords: ["the"],
      faceting: { maxValuesPerFacet: 7, sortFacetValuesBy: { "*": "alpha" } },
      searchableAttributes: ["a"],
    });
    await index.resetSettings().waitTask();
    expect(await index.getSettings()).toMatchObject(DEFAULTS);
  });

  test("null puts one back, the others stay", async () => {
    await index.updateSettings({ sortableAttributes: ["a"], filterableAttributes: ["b"] }).waitTask();
    await index.updateSettings({ sortableAttributes: null } as never).waitTask();
    expect(await index.getSettings()).toMatchObject({ sortableAttributes: [], filterableAttributes: ["b"] });
  });

  test("each has its own route", async () => {
    await index.updateFilterableAttributes(["b", "a"]).waitTask();
    expect(await index.getFilterableAttributes()).toEqual(expect.arrayContaining(["a", "b"]));
    await index.updatePagination({ maxTotalHits: 50 }).waitTask();
    expect(await index.getPagination()).toEqual({ maxTotalHits: 50 });
    await index.updateTypoTolerance({ minWordSizeForTypos: { oneTypo: 4 } }).waitTask();
    expect(await index.getTypoTolerance()).toMatchObject({
      enabled: true,
      minWordSizeForTypos: { oneTypo: 4, twoTypos: 9 },
    });
    await index.resetTypoTolerance().waitTask();
    expect(await index.getTypoTolerance()).toMatchObject({ minWordSizeForTypos: { oneTypo: 5, twoTypos: 9 } });
    await index.updateDistinctAttribute("a").waitTask();
    expect(await index.getDistinctAttribute()).toBe("a");
    await index.updateFaceting({ sortFacetValuesBy: { test: "count" } }).waitTask();
    expect((await index.getFaceting()).sortFacetValuesBy).toEqual({ "*": "alpha", test: "count" });
  });

  test("take effect on what is indexed already", async () => {
    await index.addDocuments([{ id: 1, name: "The Mill", maker: "osier" }]).waitTask();
    expect((await index.search("osier")).hits).toHaveLength(1);
    await index
      .updateSettings({ searchableAttributes: ["name"], displayedAttributes: ["name"], stopWords: ["the"] })
      .waitTask();
    expect((await index.search("osier")).hits).toEqual([]);
    expect((await index.search("mill")).hits).toEqual([{ name: "The Mill" }]);
    await index.updateSynonyms({ grinder: ["mill"] }).waitTask();
    expect((await index.search("grinder")).hits).toHaveLength(1);
    await index.updateTypoTolerance({ enabled: false }).waitTask();
    expect((await index.search("grindre")).hits).toEqual([]);
  });

  test("pages end at the greatest total", async () => {
    await index.updatePagination({ maxTotalHits: 3 }).waitTask();
    await index.addDocuments(Array.from({ length: 8 }, (_, id) => ({ id }))).waitTask();
    expect(await index.search("", { page: 1, hitsPerPage: 2 })).toMatchObject({ totalHits: 3, totalPages: 2 });
    expect((await index.search("", { page: 2, hitsPerPage: 2 })).hits).toHaveLength(1);
  });

  test.each([
    ["a rule that isn't one", { rankingRules: ["beauty"] }, "invalid_settings_ranking_rules"],
    ["a text for a list", { stopWords: "the" }, "invalid_settings_stop_words"],
    ["an unknown order of values", { faceting: { sortFacetValuesBy: { a: "size" } } }, "invalid_settings_faceting"],
    [
      "fewer letters for two errors than for one",
      { typoTolerance: { minWordSizeForTypos: { oneTypo: 9, twoTypos: 5 } } },
      "invalid_settings_typo_tolerance",
    ],
    ["an unknown name", { beauty: 1 }, "bad_request"],
  ])("%s is refused", async (_, body, expected) => {
    await expect(index.updateSettings(body as never)).rejects.toMatchObject(code(expected));
  });

  test("writing them creates the index, resetting them doesn't", async () => {
    const fresh = service.client.index(freshIndexName());
    expect((await fresh.resetSettings().waitTask()).error?.code).toBe("index_not_found");
    expect((await fresh.updateSortableAttributes(["a"]).waitTask()).status).toBe("succeeded");
    await fresh.delete().waitTask();
  });
});
