import { afterAll, beforeAll, describe, expect, test } from "vitest";
import type { Index } from "meilisearch";
import { DESIGNS_INDEX, INDEX_SETTINGS } from "@/search/settings";
import { freshIndexName, openSearchService, type SearchService } from "../setup/search-service";

let service: SearchService;
let index: Index;
const FANS = Array.from({ length: 60 }, (_, id) => ({
  id,
  name: id % 2 === 0 ? "Mill" : "Lantern",
  stages: 1 + (id % 3),
  material: ["PLA", "PETG", "ABS"][id % 3],
  tags: id % 4 === 0 ? ["quiet", "deep"] : ["quiet"],
  gap: id / 10,
  hand: id < 30 ? "left" : "right",
  ...(id === 7 ? { year: 2024 } : {}),
}));
beforeAll(async () => {
  service = await openSearchService();
  index = service.client.index(freshIndexName());
  await index
    .updateSettings({
      filterableAttributes: ["stages", "material", "tags", "gap", "hand", "year", "absent"],
      sortableAttributes: ["gap"],
      faceting: { maxValuesPerFacet: 10, sortFacetValuesBy: { "*": "count" } },
    })
    .waitTask();
  await index.addDocuments(FANS).waitTask();
});
afterAll(async () => {
  await index.delete().waitTask();
  await service.close();
});

const code = (expected: string) => ({ cause: expect.objectContaining({ code: expected }) as unknown });
/** Recount by plain code, as an independent check. */
const count = (keep: (fan: (typeof FANS)[number]) => boolean, of: (fan: (typeof FANS)[number]) => unknown) => {
  const counts: Record<string, number> = {};
  for (const fan of FANS.filter(keep))
    for (const value of [of(fan)].flat()) counts[String(value)] = (counts[String(value)] ?? 0) + 1;
  return counts;
};

describe("facet counts", () => {
  test("equal a recount over everything, over a filter, and over words with a filter", async () => {
    const facets = ["stages", "material", "tags", "hand"];
    const cases = [
      { q: "", filter: undefined, keep: () => true },
      {
        q: "",
        filter: [["material = PLA", "material = abs"], "hand = left"],
        keep: (f: (typeof FANS)[number]) => f.material !== "PETG" && f.hand === "left",
      },
      {
        q: "lantern",
        filter: "gap 1 TO 3",
        keep: (f: (typeof FANS)[number]) => f.name === "Lantern" && f.gap >= 1 && f.gap <= 3,
      },
    ];
    for (const { q, filter, keep } of cases) {
      const { facetDistribution } = await index.search(q, {
        facets,
        hitsPerPage: 5,
        ...(filter === undefined ? {} : { filter }),
      });
      expect(facetDistribution).toEqual({
        stages: count(keep, (fan) => fan.stages),
        material: count(keep, (fan) => fan.material),
        tags: count(keep, (fan) => fan.tags),
        hand: count(keep, (fan) => fan.hand),
      });
    }
  });

  test("numbers have a range over the hits, texts have none", async () => {
    const { facetStats } = await index.search("", { facets: ["gap", "material"], filter: "stages = 2" });
    expect(facetStats).toEqual({ gap: { min: 0.1, max: 5.8 } });
  });

  test("a field of no document is left out, one without a value among the hits is empty", async () => {
    const { facetDistribution } = await index.search("", { facets: ["absent", "year"], filter: "hand = right" });
    expect(facetDistribution).toEqual({ year: {} });
  });

  test("are limited, most frequent first or first in order, without changing the totals", async () => {
    const answer = await index.search("", { facets: ["gap", "stages"], hitsPerPage: 1 });
    expect(Object.keys(answer.facetDistribution?.gap ?? {})).toHaveLength(10);
    expect(answer.totalHits).toBe(60);
    await index.updateFaceting({ maxValuesPerFacet: 2, sortFacetValuesBy: { "*": "alpha" } }).waitTask();
    const first = await index.search("", { facets: ["material", "stages"] });
    expect(first.facetDistribution).toEqual({ material: { ABS: 20, PETG: 20 }, stages: { 1: 20, 2: 20 } });
    await index.updateFaceting({ maxValuesPerFacet: 10, sortFacetValuesBy: { "*": "count" } }).waitTask();
  });

  test("of a field that isn't filterable are refused", async () => {
    await expect(index.search("", { facets: ["name"] })).rejects.toMatchObject(code("invalid_search_facets"));
  });

  test("each group without its own choice, in one request", async () => {
    const queries = [
      {
        indexUid: index.uid,
        q: "mill",
        filter: ["material = PLA", "hand = left"],
        facets: ["stages"],
        page: 1,
        hitsPerPage: 5,
      },
      { indexUid: index.uid, q: "mill", filter: ["hand = left"], facets: ["material"], hitsPerPage: 0 },
      { indexUid: index.uid, q: "mill", filter: ["material = PLA"], facets: ["hand"], hitsPerPage: 0 },
    ];
    const { results } = await service.client.multiSearch({ queries });
    expect(results[1]?.facetDistribution).toEqual({
      material: count(
        (f) => f.name === "Mill" && f.hand === "left",
        (f) => f.material,
      ),
    });
    expect(results[2]?.facetDistribution).toEqual({
      hand: count(
        (f) => f.name === "Mill" && f.material === "PLA",
        (f) => f.hand,
      ),
    });
    expect(results[1]?.hits).toEqual([]);
  });

  test("follow the change of a document", async () => {
    await index.updateDocuments([{ id: 59, material: "PC" }]).waitTask();
    const { facetDistribution } = await index.search("", { facets: ["material"] });
    expect(facetDistribution).toEqual({ material: { PLA: 20, PETG: 20, ABS: 19, PC: 1 } });
    await index.updateDocuments([{ id: 59, material: "ABS" }]).waitTask();
  });
});

describe("values of a facet are searched", () => {
  test("by their beginning, with the counts of the filter", async () => {
    const found = await index.searchForFacetValues({ facetName: "material", facetQuery: "p", filter: "hand = left" });
    expect(found.facetHits).toEqual(
      expect.arrayContaining([
        { value: "PLA", count: 10 },
        { value: "PETG", count: 10 },
      ]),
    );
    expect(found).toMatchObject({ facetQuery: "p", facetHits: { length: 2 } });
  });

  test("all of them without a text, and only those of the words' documents", async () => {
    const all = await index.searchForFacetValues({ facetName: "tags" });
    expect(all).toMatchObject({ facetQuery: null, facetHits: { length: 2 } });
    const some = await index.searchForFacetValues({ facetName: "tags", facetQuery: "deep", q: "lantern" });
    expect(some.facetHits).toEqual([]);
  });

  test("a name is needed, and it must be filterable", async () => {
    await expect(index.searchForFacetValues({} as never)).rejects.toMatchObject(
      code("missing_facet_search_facet_name"),
    );
    await expect(index.searchForFacetValues({ facetName: "name" })).rejects.toMatchObject(
      code("invalid_facet_search_facet_name"),
    );
  });
});

test("one hit a value when asked for", async () => {
  const { hits } = await index.search("", { distinct: "stages", sort: ["gap:desc"] });
  expect(hits.map((hit) => hit.stages).sort()).toEqual([1, 2, 3]);
});

test("the product's own settings are taken as they are", async () => {
  const own = service.client.index(`${freshIndexName()}-${DESIGNS_INDEX}`);
  expect((await own.updateSettings(INDEX_SETTINGS as never).waitTask()).status).toBe("succeeded");
  expect(await own.getSettings()).toMatchObject({
    rankingRules: INDEX_SETTINGS.rankingRules,
    searchableAttributes: INDEX_SETTINGS.searchableAttributes,
    faceting: INDEX_SETTINGS.faceting,
    pagination: INDEX_SETTINGS.pagination,
  });
  await own.delete().waitTask();
});
