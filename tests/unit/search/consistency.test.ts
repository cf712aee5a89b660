import fc from "fast-check";
import { expect, test } from "vitest";
import { search } from "@/search/stand-in/search";
import { SearchIndex } from "@/search/stand-in/search-index";
import { readSearch } from "@/search/stand-in/search-params";

const SETTINGS = {
  searchableAttributes: ["name", "tags"],
  filterableAttributes: ["stages", "tags", "gap"],
  sortableAttributes: ["gap", "id"],
};

type Fan = { id: number; name: string; stages?: number | string; tags: string[]; gap?: number | null };
const word = fc.constantFrom("mill", "slow", "heron", "wing", "paper", "lantern", "quiet");
const fan: fc.Arbitrary<Fan> = fc.record(
  {
    id: fc.integer({ min: 0, max: 12 }),
    name: fc.array(word, { maxLength: 3 }).map((words) => words.join(" ")),
    stages: fc.constantFrom<number | string>(1, 2, "2", "two"),
    tags: fc.array(word, { maxLength: 2 }),
    gap: fc.constantFrom<number | null>(0, 0.5, 2, null),
  },
  { requiredKeys: ["id", "name", "tags"] },
);
type Step = { put: Fan } | { remove: number };
const step: fc.Arbitrary<Step> = fc.oneof(
  { weight: 3, arbitrary: fan.map((put) => ({ put })) },
  { weight: 1, arbitrary: fc.integer({ min: 0, max: 12 }).map((remove) => ({ remove })) },
);

function emptyIndex(): SearchIndex {
  const index = new SearchIndex("fans", "id", "2026-01-01T00:00:00Z");
  index.changeSettings(SETTINGS);
  return index;
}

function answer(index: SearchIndex, body: Record<string, unknown>): Record<string, unknown> {
  const options = { allowContains: false, texts: new Map(), now: () => 0, requestUid: "" };
  return search(
    index,
    readSearch({ sort: ["id:asc"], limit: 50, facets: ["stages", "tags", "gap"], ...body }),
    options,
  );
}

test("after any run of writes and removals an index answers as one that was filled afresh", () => {
  fc.assert(
    fc.property(fc.array(step, { maxLength: 30 }), word, (steps, q) => {
      const index = emptyIndex();
      answer(index, { q });
      index.prepare();
      const kept = new Map<number, Fan>();
      for (const each of steps) {
        if ("put" in each) {
          index.put(String(each.put.id), each.put as never);
          kept.set(each.put.id, each.put);
        } else {
          expect(index.remove(String(each.remove))).toBe(kept.delete(each.remove));
        }
        if (kept.size % 3 === 0) answer(index, { q });
      }
      const fresh = emptyIndex();
      for (const [id, document] of kept) fresh.put(String(id), document as never);
      for (const body of [
        {},
        { q },
        { q: q.slice(0, 3) },
        { filter: "gap >= 0.5 OR stages = 2" },
        { filter: "tags NOT EXISTS OR gap IS NULL" },
      ]) {
        const { hits, facetDistribution, facetStats, estimatedTotalHits } = answer(index, body);
        const expected = answer(fresh, body);
        expect((hits as Fan[]).map((hit) => hit.id).sort()).toEqual(
          (expected.hits as Fan[]).map((hit) => hit.id).sort(),
        );
        expect([facetDistribution, facetStats, estimatedTotalHits]).toEqual([
          expected.facetDistribution,
          expected.facetStats,
          expected.estimatedTotalHits,
        ]);
      }
      expect(index.fieldDistribution).toEqual(fresh.fieldDistribution);
      expect([index.count, index.documentBytes]).toEqual([fresh.count, fresh.documentBytes]);
    }),
    { numRuns: 300 },
  );
});

test("a filter's documents and counts equal a plain pass over the documents", () => {
  fc.assert(
    fc.property(
      fc.uniqueArray(fan, { selector: (each) => each.id, maxLength: 13 }),
      word,
      fc.constantFrom(0, 0.5, 2),
      (fans, tag, gap) => {
        const index = emptyIndex();
        for (const each of fans) index.put(String(each.id), each as never);
        const wanted = fans.filter(
          (each) => each.tags.includes(tag) && typeof each.gap === "number" && each.gap <= gap,
        );
        const { hits, facetDistribution } = answer(index, { filter: [`tags = ${tag}`, `gap <= ${gap}`] });
        expect((hits as Fan[]).map((hit) => hit.id)).toEqual(wanted.map((each) => each.id).sort((a, b) => a - b));
        const shown = (facetDistribution as Record<string, Record<string, number>>).tags ?? {};
        const counts: Record<string, number> = {};
        for (const each of wanted) for (const value of new Set(each.tags)) counts[value] = (counts[value] ?? 0) + 1;
        expect(shown).toEqual(counts);
      },
    ),
    { numRuns: 300 },
  );
});

test("the spelling of a removed document doesn't show in the counts of those that stay", () => {
  const index = emptyIndex();
  index.put("1", { id: 1, name: "", tags: ["QUIET"] });
  expect(answer(index, {}).facetDistribution).toEqual({ tags: { QUIET: 1 } });
  index.remove("1");
  expect(answer(index, {}).facetDistribution).toEqual({});
  index.put("2", { id: 2, name: "", tags: ["quiet"] });
  expect(answer(index, {}).facetDistribution).toEqual({ tags: { quiet: 1 } });
});

test("values that no document holds any more are cleared away", () => {
  const index = emptyIndex();
  index.put("1", { id: 1, name: "", tags: [], gap: 0 });
  answer(index, {});
  for (let gap = 0; gap < 5000; gap += 1) index.put("1", { id: 1, name: "", tags: [], gap });
  expect(index.column("gap").size).toBe(5000);
  index.prepare();
  expect(index.column("gap").size).toBe(1);
  expect(answer(index, { facets: ["gap"] }).facetDistribution).toEqual({ gap: { 4999: 1 } });
});
