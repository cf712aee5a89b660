import { afterAll, beforeAll, describe, expect, test } from "vitest";
import type { Index } from "meilisearch";
import { freshIndexName, openSearchService, type SearchService } from "../setup/search-service";

let service: SearchService;
let index: Index;
const FANS = [
  { id: 1, name: "Slow Mill", note: "A quiet rotor with seven blades", stages: 1, gap: 0.5, designer: "quillwork" },
  {
    id: 2,
    name: "Heronwing",
    note: "Counter-rotating pair, nine blades in front",
    stages: 2,
    gap: 1.5,
    designer: "osier",
  },
  { id: 3, name: "Paper Lantern", note: "Bellmouth and quiet struts", stages: 1, gap: 1, designer: "tarn" },
  { id: 4, name: "Millrace", note: "Wide chord, not quite silent", stages: 3, designer: "osier" },
  { id: 5, name: "Été", note: null, stages: 1, gap: 2, designer: "marl" },
];
beforeAll(async () => {
  service = await openSearchService();
  index = service.client.index(freshIndexName());
  await index
    .updateSettings({
      searchableAttributes: ["name", "note", "designer"],
      filterableAttributes: ["stages", "gap", "designer"],
      sortableAttributes: ["gap", "name", "stages"],
      rankingRules: ["sort", "words", "typo", "proximity", "attributeRank", "wordPosition", "exactness"],
      typoTolerance: { disableOnAttributes: ["designer"] },
    })
    .waitTask();
  await index.addDocuments(FANS).waitTask();
});
afterAll(async () => {
  await index.delete().waitTask();
  await service.close();
});

const ids = async (q: string, options = {}): Promise<unknown[]> =>
  (await index.search(q, options)).hits.map((hit) => hit.id);
const sorted = async (q: string, options = {}): Promise<unknown[]> => (await ids(q, options)).sort();
const code = (expected: string) => ({ cause: expect.objectContaining({ code: expected }) as unknown });

// Typo rules: the service's documentation on typo tolerance (5 and 9 letters, first letter counts double).
describe("words are found with errors forgiven", () => {
  test.each<[string, string, number[]]>([
    ["exactly", "heronwing", [2]],
    ["without accents", "ete", [5]],
    ["by the beginning of the last word", "heron", [2]],
    ["with one error from five letters", "herno", [2]],
    ["two errors from nine letters", "hronwnig", []],
    ["two errors in nine letters", "heronwgni", [2]],
    ["no error under five letters", "mlil", []],
    ["a wrong first letter counts double, too much for seven letters", "kantern", []],
    ["in fields without forgiveness only exactly", "quilwork", []],
    ["in fields without forgiveness by the beginning", "quillw", [1]],
  ])("%s", async (_, q, expected) => {
    expect(await sorted(q, { matchingStrategy: "all" })).toEqual(expected);
  });

  test("all words or the first ones only", async () => {
    expect(await sorted("quiet lantern", { matchingStrategy: "all" })).toEqual([3]);
    expect(await sorted("quiet lantern")).toEqual([1, 3, 4]);
    expect(await sorted("lantern quiet")).toEqual([3]);
    expect(await sorted("quiet lantern", { matchingStrategy: "frequency" })).toEqual([3]);
  });

  test("more words first, then fewer errors", async () => {
    expect(await ids("quiet lantern")).toEqual([3, 1, 4]);
  });

  test("phrases, excluded words, chosen fields", async () => {
    expect(await sorted('"quiet struts"', { matchingStrategy: "all" })).toEqual([3]);
    expect(await sorted('"struts quiet"')).toEqual([]);
    expect(await sorted("quiet -struts")).toEqual([1, 4]);
    expect(await sorted("mill", { attributesToSearchOn: ["note"] })).toEqual([]);
    await expect(index.search("x", { attributesToSearchOn: ["gap"] })).rejects.toMatchObject(
      code("invalid_search_attributes_to_search_on"),
    );
  });

  test("no words: everything", async () => {
    for (const q of ["", "   ", null]) expect((await index.search(q)).hits).toHaveLength(5);
  });
});

describe("sorting", () => {
  test("is strict when its rule comes first, and puts those without a value last both ways", async () => {
    expect(await ids("", { sort: ["gap:asc"] })).toEqual([1, 3, 2, 5, 4]);
    expect(await ids("", { sort: ["gap:desc"] })).toEqual([5, 2, 3, 1, 4]);
    expect(await ids("", { sort: ["stages:asc", "gap:desc"] })).toEqual([5, 3, 1, 2, 4]);
    expect(await ids("", { sort: ["name:asc"], limit: 2 })).toEqual([5, 2]);
  });

  test("by what isn't sortable, or without a direction, is refused", async () => {
    await expect(index.search("", { sort: ["note:asc"] })).rejects.toMatchObject(code("invalid_search_sort"));
    await expect(index.search("", { sort: ["gap"] })).rejects.toMatchObject(code("invalid_search_sort"));
  });
});

describe("paging", () => {
  test("by limit and offset", async () => {
    const page = await index.search("", { limit: 2, offset: 4 });
    expect(page).toMatchObject({ limit: 2, offset: 4, estimatedTotalHits: 5, query: "" });
    expect(page.hits).toHaveLength(1);
    expect(page).not.toHaveProperty("totalHits");
  });

  test("by page and hits a page; zero of either counts only", async () => {
    expect(await index.search("", { page: 2, hitsPerPage: 2 })).toMatchObject({
      page: 2,
      hitsPerPage: 2,
      totalPages: 3,
      totalHits: 5,
    });
    expect(await index.search("", { hitsPerPage: 0 })).toMatchObject({
      hits: [],
      page: 1,
      totalPages: 0,
      totalHits: 5,
    });
    expect(await index.search("", { page: 0 })).toMatchObject({ hits: [], page: 0, hitsPerPage: 20, totalPages: 1 });
    expect(await index.search("", { page: 1 })).not.toHaveProperty("limit");
  });

  test("the pages together are the whole, once each", async () => {
    const all = await Promise.all([1, 2, 3].map((page) => ids("", { page, hitsPerPage: 2, sort: ["stages:asc"] })));
    expect(all.flat().sort()).toEqual([1, 2, 3, 4, 5]);
  });
});

describe("what a hit shows", () => {
  test("chosen fields", async () => {
    const { hits } = await index.search("heronwing", { attributesToRetrieve: ["id", "name"] });
    expect(hits).toEqual([{ id: 2, name: "Heronwing" }]);
  });

  test("marks around matches, numbers as texts beside them", async () => {
    const { hits } = await index.search("quiet mil", {
      attributesToHighlight: ["name", "note"],
      highlightPreTag: "\uE000",
      highlightPostTag: "\uE001",
      matchingStrategy: "all",
    });
    expect(hits[0]?._formatted).toMatchObject({
      id: "1",
      name: "Slow \uE000Mil\uE001l",
      note: "A \uE000quiet\uE001 rotor with seven blades",
      gap: "0.5",
    });
  });

  test("places of matches and shortened texts", async () => {
    const { hits } = await index.search("seven", {
      attributesToCrop: ["note"],
      cropLength: 3,
      showMatchesPosition: true,
    });
    expect(hits[0]?._matchesPosition).toEqual({ note: [{ start: 19, length: 5 }] });
    expect(hits[0]?._formatted?.note).toBe("…with seven blades");
  });
});

describe("one request of several searches", () => {
  test("answers in order, each with its index", async () => {
    const queries = [
      { indexUid: index.uid, q: "mill" },
      { indexUid: index.uid, q: "mill", filter: "stages = 3" },
    ];
    const { results } = await service.client.multiSearch({ queries });
    expect(results.map((each) => each.hits.map((hit) => hit.id).sort())).toEqual([[1, 4], [4]]);
    expect(results[0]?.indexUid).toBe(index.uid);
  });

  test("a bad one refuses all and is named", async () => {
    const queries = [{ indexUid: index.uid }, { indexUid: index.uid, filter: "note = x" }];
    const refusal = expect(service.client.multiSearch({ queries })).rejects;
    await refusal.toMatchObject(code("invalid_search_filter"));
    await expect(service.client.multiSearch({ queries })).rejects.toThrow(/^Inside `\.queries\[1\]`: /);
  });
});

test("parameters of the wrong type or name are refused with their codes", async () => {
  await expect(index.search("", { limit: "2" as unknown as number })).rejects.toMatchObject(
    code("invalid_search_limit"),
  );
  await expect(index.search("", { nonsense: 1 } as object)).rejects.toMatchObject(code("bad_request"));
  await expect(service.client.index("absent").search("")).rejects.toMatchObject(code("index_not_found"));
});

test("a search by address is the same search", async () => {
  const options = { filter: "stages = 1", sort: ["gap:desc"], attributesToRetrieve: ["id"], facets: ["stages"] };
  const got = await index.searchGet("", options);
  const posted = await index.search("", options);
  expect([got.hits, got.facetDistribution]).toEqual([posted.hits, posted.facetDistribution]);
});
