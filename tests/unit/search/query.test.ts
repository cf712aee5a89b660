import fc from "fast-check";
import { afterAll, beforeAll, describe, expect, test } from "vitest";
import { facetKeys, indexQuerySchema, parseIndexQuery, rangeKeys, type IndexQuery } from "@/lib/contracts/index-query";
import { searchDocument, type SearchSource } from "@/search/document";
import { indexFilter, indexQueries, piecesOf, searchDesigns } from "@/search/query";
import { DESIGNS_INDEX, INDEX_SETTINGS } from "@/search/settings";
import { startSearchStandIn, type StandIn } from "@/search/stand-in/server";
import { clientOf } from "@/tests/setup/search-service";
import { source } from "./search-source";

const ask = (more: Partial<IndexQuery> = {}): IndexQuery => indexQuerySchema.parse(more);

describe("the filter is built from data", () => {
  test("values of a group are alternatives, groups and bounds go together", () => {
    const query = ask({
      facets: { blades1: ["7", "9"], inlet: ["bellmouth"] },
      ranges: { gap: { low: 0.5, high: 1 }, mass: { low: null, high: 30 } },
    });
    expect(indexFilter(query)).toEqual([
      ['blades1 = "7"', 'blades1 = "9"'],
      ['inlet = "bellmouth"'],
      ['gap >= "0.5"'],
      ['gap <= "1"'],
      ['mass <= "30"'],
    ]);
    expect(indexFilter(query, "blades1")).not.toContainEqual(['blades1 = "7"', 'blades1 = "9"']);
    expect(indexFilter(query, "gap")).toEqual([
      ['blades1 = "7"', 'blades1 = "9"'],
      ['inlet = "bellmouth"'],
      ['mass <= "30"'],
    ]);
  });

  test("whatever an address holds, a value stays inside its quotes", () => {
    fc.assert(
      fc.property(fc.array(fc.string({ minLength: 1, maxLength: 40 }), { minLength: 1, maxLength: 4 }), (values) => {
        for (const text of indexFilter(ask({ facets: { designer: values } })).flat()) {
          // Quotes that aren't escaped: exactly the two around the value.
          expect(text.replace(/\\[\\"]/g, "").match(/"/g)).toHaveLength(2);
          expect(text.startsWith('designer = "') && text.endsWith('"')).toBe(true);
        }
      }),
    );
  });

  test("one query for the page, one a group with a choice, one for how many there are at all", () => {
    const query = ask({ q: "mill", facets: { hand: ["left"] }, ranges: { gap: { low: 1, high: null } } });
    const { queries, groups } = indexQueries(query, "all");
    expect(groups).toEqual(["hand", "gap"]);
    expect(queries).toHaveLength(4);
    const [page, hand, gap, all] = queries;
    expect(page?.facets).toHaveLength(facetKeys.length + rangeKeys.length - 2 + 1);
    expect(page?.facets).not.toContain("hand");
    expect(hand).toMatchObject({ facets: ["hand"], filter: [['gap >= "1"']], hitsPerPage: 0, matchingStrategy: "all" });
    expect(gap).toMatchObject({ facets: ["gapBin"], filter: [['hand = "left"']] });
    expect(all).toEqual({ indexUid: DESIGNS_INDEX, q: "", hitsPerPage: 0 });
  });
});

describe("asked of a service", () => {
  let standIn: StandIn;
  const masterKey = "query-test-key";
  const sources: SearchSource[] = [
    source({ entryId: "e1", name: "Slow Heronwing", facets: { material: "PLA" } }),
    source({ entryId: "e2", name: "Lantern Mill", facets: { material: "PETG", designer: "x" }, designers: ["osier"] }),
    source({ entryId: "e3", name: 'Quote " OR stages = "1', facets: { material: 'P"LA\\' } }),
  ];
  beforeAll(async () => {
    standIn = await startSearchStandIn({ port: 0, masterKey });
    const index = clientOf(standIn.url, masterKey).index(DESIGNS_INDEX);
    await index.updateSettings(INDEX_SETTINGS).waitTask();
    await index.addDocuments(sources.map(searchDocument), { primaryKey: "id" }).waitTask();
  });
  afterAll(() => standIn.close());
  const find = (more: Partial<IndexQuery>) => searchDesigns(clientOf(standIn.url, masterKey), ask(more));

  test.each([
    'PLA" OR material != "PLA',
    "PLA' OR 'a' = 'a",
    'PLA\\" OR stages = "1',
    'PLA"] , ["stages = 1',
    "PLA OR stages EXISTS",
  ])("an injected condition matches nothing: %s", async (value) => {
    const found = await find({ facets: { material: [value] } });
    expect([found.total, found.ofAll]).toEqual([0, 3]);
  });

  test("a value with quotes and backslashes is found as it is", async () => {
    expect((await find({ facets: { material: ['P"LA\\'] } })).entryIds).toEqual(["e3"]);
  });

  test("a chosen facet is counted without its own filter", async () => {
    const found = await find({ facets: { material: ["PLA"] } });
    expect(found.total).toBe(1);
    expect(found.facets.material).toEqual([
      { value: 'P"LA\\', count: 1 },
      { value: "PETG", count: 1 },
      { value: "PLA", count: 1 },
    ]);
    expect(found.facets.stages).toEqual([{ value: "1", count: 1 }]);
  });

  test("an error of typing is forgiven, and what matched is marked without any markup", async () => {
    const found = await find({ q: "heronwnig" });
    expect(found.entryIds).toEqual(["e1"]);
    expect(found.highlights.e1?.name).toEqual([
      { text: "Slow ", hit: false },
      { text: "Heronwing", hit: true },
    ]);
  });

  test("all words are asked for; where nothing has them all, the last may be missing", async () => {
    expect((await find({ q: "lantern osier" })).entryIds).toEqual(["e2"]);
    expect((await find({ q: "lantern heronwing" })).entryIds).toEqual(["e2"]);
    expect((await find({ q: "nothingatall" })).total).toBe(0);
  });

  test("text that an address brings can't leave the query", () => {
    const query = parseIndexQuery(new URLSearchParams('material=PLA" OR x = "&gap-from=1) OR (1&sort=id:asc,-x'));
    expect(indexFilter(query)).toEqual([['material = "PLA\\" OR x = \\""']]);
    expect(query.sort).toBe("equal");
  });
});

test("pieces joined are the text without its marks", () => {
  const pieces = piecesOf("a \uE000bc\uE001 d \uE000e\uE001");
  expect(pieces.map((piece) => piece.text).join("")).toBe("a bc d e");
  expect(pieces.filter((piece) => piece.hit).map((piece) => piece.text)).toEqual(["bc", "e"]);
});
