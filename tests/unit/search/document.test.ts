import { describe, expect, test } from "vitest";
import { facetKeys, rangeKeys } from "@/lib/contracts/index-query";
import { indexDigest, searchDocument } from "@/search/document";
import { INDEX_SETTINGS, binField } from "@/search/settings";
import { source } from "./search-source";

describe("the index's document", () => {
  test("what has no value is left out, and every value has its bin", () => {
    const document = searchDocument(source());
    expect(document).not.toHaveProperty("blades2");
    expect(document).not.toHaveProperty("cooling");
    expect(document).not.toHaveProperty("coolingBin");
    expect(document).toMatchObject({ equal: -1.25, equalBin: -1.5, gap: 0.7, gapBin: 0.7, level: 0, levelBin: 0 });
    expect(document).toMatchObject({ blades1: "7", designer: ["quillwork"], scale: "b p u" });
  });

  test("its digest changes with what the index shows and with nothing else", () => {
    const { rev } = searchDocument(source());
    expect(searchDocument(source()).rev).toBe(rev);
    const changed = [
      source({ name: "Other Mill" }),
      source({ designers: ["osier"] }),
      source({ seasonTitle: "Spring" }),
      source({ roundRank: null }),
      source({ facets: { tone: "true" } }),
      source({ ranges: { mass: 24.5 } }),
    ].map((each) => searchDocument(each).rev);
    expect(new Set([rev, ...changed]).size).toBe(7);
  });

  test("holds no field that the settings don't know, so nothing is sent that nobody may ask for", () => {
    const full = searchDocument(
      source({ facets: { blades2: "5", tone: "true" }, ranges: { cooling: -2, loudness: 3 } }),
    );
    const known: readonly string[] = [
      ...INDEX_SETTINGS.filterableAttributes,
      ...INDEX_SETTINGS.sortableAttributes,
      ...INDEX_SETTINGS.displayedAttributes,
    ];
    expect(Object.keys(full).filter((field) => !known.includes(field))).toEqual([]);
    for (const key of facetKeys) expect(full).toHaveProperty(key);
    for (const key of rangeKeys) expect(full).toHaveProperty(binField(key));
  });

  test("words of traits are those of the page, and characters that mark highlights are taken out of names", () => {
    const words = searchDocument(source({ facets: { stages: "2", rotation: "counter", blades2: "5" } })).traitWords;
    expect(words).toBe(
      "two stages counter-rotating 7 5 blades right-handed bellmouth inlet stack 20 mm 4 struts 120x25 PETG CC0-1.0",
    );
    expect(searchDocument(source({ name: "A\uE000b\uE001" })).name).toBe("Ab");
  });

  test("settings and the making of documents have one digest", () => {
    expect(indexDigest()).toMatch(/^[0-9a-f]{64}$/);
    expect(indexDigest()).toBe(indexDigest());
  });
});
