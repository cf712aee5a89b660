import type { SearchSource } from "@/search/document";

type Changes = Partial<Omit<SearchSource, "facets" | "ranges">> & {
  facets?: Partial<SearchSource["facets"]>;
  ranges?: Partial<SearchSource["ranges"]>;
};

/** An entry as the public view gives it, with what the test is about set. */
export function source({ facets, ranges, ...rest }: Changes = {}): SearchSource {
  return {
    entryId: "0190a000-0000-7000-8000-000000000001",
    name: "Mill",
    letter: "A",
    designers: ["quillwork"],
    seasonTitle: "Season 1",
    inletStackMm: 20,
    publishedAt: new Date("2025-03-01T10:00:00Z"),
    roundRank: 3,
    levelFullDba: 52.1,
    deltaTFullK: 54.4,
    benchVersionId: "b",
    protocolVersionId: "p",
    baselineUnitId: "u",
    ...rest,
    facets: {
      stages: "1",
      rotation: "single",
      blades1: "7",
      blades2: null,
      hand: "right",
      inlet: "bellmouth",
      spacer: "false",
      struts: "4",
      shroud: "false",
      frame: "120x25",
      material: "PETG",
      season: "season-1",
      designer: null,
      licence: "CC0-1.0",
      tone: null,
      ...facets,
    },
    ranges: {
      equal: -1.25,
      ratio: 96.4,
      cooling: null,
      level: 0,
      loudness: null,
      gap: 0.7,
      solidity: 0.9,
      pitch: 34,
      mass: 24,
      print: 200,
      ...ranges,
    },
  };
}
