import { describe, expect, test } from "vitest";
import { ServiceError } from "@/search/stand-in/errors";
import { parseFilter } from "@/search/stand-in/filter-parse";
import { SearchIndex } from "@/search/stand-in/search-index";
import { runFilter } from "@/search/stand-in/filter-run";

const CODE = "invalid_search_filter";

function indexOf(documents: Record<string, unknown>[]): SearchIndex {
  const index = new SearchIndex("fans", "id", "2026-01-01T00:00:00Z");
  index.changeSettings({ filterableAttributes: ["stages", "material", "name", "tags", "gap", "note", "flag", "info"] });
  documents.forEach((document, i) => index.put(String(i), { id: i, ...document } as never));
  return index;
}

function kept(index: SearchIndex, filter: unknown, allowContains = false): number[] {
  const parsed = parseFilter(filter, CODE);
  if (parsed === undefined) throw new Error("no filter");
  const mask = runFilter(parsed, index.filterContext(CODE, allowContains));
  return [...mask.keys()].filter((slot) => mask[slot] === 1);
}

function refusal(run: () => unknown): ServiceError {
  try {
    run();
  } catch (error) {
    if (error instanceof ServiceError) return error;
    throw error;
  }
  throw new Error("nothing was refused");
}

// Expected sets follow the filter grammar and semantics of the service's public documentation (filter expression reference).
describe("filters keep the documents that the service's documentation says", () => {
  const index = indexOf([
    { stages: 1, material: "PLA", name: "Slow Mill", tags: ["quiet", "Deep"], gap: 0.5, note: null },
    { stages: 2, material: "petg", name: "Été", tags: [], gap: 1, note: "" },
    { stages: "2", material: " PLA ", name: "Heron's wing", tags: ["deep"], gap: 2.5 },
    { material: "abs", name: 'say "hi"', flag: true, info: { grade: "a" } },
  ]);

  test.each<[string, unknown, number[]]>([
    ["equality ignores case and outer spaces", "material = pla", [0, 2]],
    ["accents count", "name = ete", []],
    ["accents match when given", "name = été", [1]],
    ["a value that reads as a number matches number and text", "stages = 2", [1, 2]],
    ["inequality keeps those without the field", "stages != 2", [0, 3]],
    ["any item of a list matches", "tags = deep", [0, 2]],
    ["booleans are texts", "flag = true", [3]],
    ["IN lists values, with a comma at the end if you like", "material IN [pla, 'abs',]", [0, 2, 3]],
    ["NOT IN", "material NOT IN [pla]", [1, 3]],
    ["TO includes both ends", "gap 0.5 TO 1", [0, 1]],
    ["ranges compare numbers", "gap > 0.5 AND gap <= 2.5", [1, 2]],
    ["AND binds closer than OR", "stages = 1 OR stages = 2 AND material = petg", [0, 1]],
    ["parentheses", "(stages = 1 OR stages = 2) AND material = pla", [0, 2]],
    ["NOT", "NOT material = pla", [1, 3]],
    ["EXISTS counts null", "note EXISTS", [0, 1]],
    ["NOT EXISTS", "note NOT EXISTS", [2, 3]],
    ["IS NULL", "note IS NULL", [0]],
    ["IS NOT NULL", "note IS NOT NULL", [1, 2, 3]],
    ["IS EMPTY takes empty texts and lists", "note IS EMPTY OR tags IS EMPTY", [1]],
    ["STARTS WITH", "name STARTS WITH 'heron'", [2]],
    ["quotes and escapes", String.raw`name = "say \"hi\"" OR name = 'Heron\'s wing'`, [2, 3]],
    ["nested fields under a filterable one", "info.grade = A", [3]],
    ["arrays: outer AND, inner OR", [["stages = 1", "stages = 2"], "material = pla"], [0, 2]],
  ])("%s", (_, filter, expected) => {
    expect(kept(index, filter)).toEqual(expected);
  });

  test("CONTAINS needs its feature", () => {
    expect(refusal(() => kept(index, "name CONTAINS mill")).code).toBe("feature_not_enabled");
    expect(kept(index, "name CONTAINS mill", true)).toEqual([0]);
  });

  test("an empty filter is none", () => {
    for (const none of [undefined, null, "", "  ", [], [[]]]) expect(parseFilter(none, CODE)).toBeUndefined();
  });
});

// Messages and columns as the service's public test suite and filter parser source show them.
describe("a filter that can't be used is refused with its place", () => {
  const index = indexOf([]);
  test.each<[string, string]>([
    [
      "doggo = bernese",
      "Attribute `doggo` is not filterable. Available filterable attribute patterns are: `flag`, `gap`, `info`, `material`, `name`, `note`, `stages`, `tags`.\n1:6 doggo = bernese",
    ],
    [
      "stages = 1 AND doggo = 2",
      "Attribute `doggo` is not filterable. Available filterable attribute patterns are: `flag`, `gap`, `info`, `material`, `name`, `note`, `stages`, `tags`.\n16:21 stages = 1 AND doggo = 2",
    ],
    ["stages =", "Was expecting a value but instead got nothing.\n9:9 stages ="],
    [
      "stages = 1 stages = 2",
      "Found unexpected characters at the end of the filter: `stages = 2`. You probably forgot an `OR` or an `AND` rule.\n12:22 stages = 1 stages = 2",
    ],
    ["name = 'a", "Expression `'a` is missing the following closing delimiter: `'`.\n8:10 name = 'a"],
  ])("%s", (filter, message) => {
    const error = refusal(() => kept(index, filter));
    expect(error.code).toBe(CODE);
    expect(error.message).toBe(message);
  });

  test("no operation at all", () => {
    const error = refusal(() => kept(index, "doggo"));
    expect(error.message).toMatch(/^Was expecting an operation `=`, `!=`.* at `doggo`\.\n1:6 doggo$/);
  });

  test("too deep a nesting, geographic filters and non-finite numbers", () => {
    const deep = "(".repeat(400) + "stages = 1" + ")".repeat(400);
    expect(refusal(() => parseFilter(deep, CODE)).message).toMatch(/^The filter exceeded the maximum depth limit/);
    expect(refusal(() => parseFilter("NOT ".repeat(400) + "stages = 1", CODE)).message).toMatch(/maximum depth limit/);
    expect(refusal(() => parseFilter("_geoRadius(1, 2, 3)", CODE)).message).toMatch(/not supported by this server/);
    expect(refusal(() => kept(index, "gap > NaN")).message).toMatch(/^Non finite floats are not supported/);
  });
});
