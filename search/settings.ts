import type { Settings } from "meilisearch";

/** Index that readers search; a rebuild fills another one under a name of its own and exchanges the two. */
export const DESIGNS_INDEX = "designs";
export const DOCUMENT_KEY = "id";

/** Searched fields, most important first. Never `*`: what isn't named here can't be found by its words. */
export const SEARCHED_FIELDS = [
  "designName",
  "designerHandles",
  "revision",
  "seasonName",
  "traitWords",
  "printNotes",
] as const;

/** Fields that are chosen by value, in the order in which the index page shows them. */
export const FACET_FIELDS = [
  "stages",
  "counterRotating",
  "bladesFirst",
  "bladesSecond",
  "hand",
  "inletStack",
  "spacer",
  "struts",
  "shroud",
  "frame",
  "material",
  "season",
  "designerHandles",
  "licence",
  "prominentTone",
] as const;
export type FacetField = (typeof FACET_FIELDS)[number];

/**
 * Numbers chosen by range. Each has a companion field `…Bin` that holds the lower edge of its bin of that width, so
 * that a histogram is one facet count. Widths are house choices for readable histograms, in the field's unit.
 */
export const RANGE_FIELDS = [
  { field: "levelDifferenceDb", binWidth: 1 },
  { field: "coolingRatioPercent", binWidth: 2 },
  { field: "equalNoiseDifferenceK", binWidth: 0.5 },
  { field: "loudnessSone", binWidth: 0.25 },
  { field: "tipGapMm", binWidth: 0.25 },
  { field: "solidity", binWidth: 0.05 },
  { field: "pitchDeg", binWidth: 2 },
  { field: "massG", binWidth: 10 },
  { field: "printTimeHours", binWidth: 1 },
] as const;
export type RangeField = (typeof RANGE_FIELDS)[number]["field"];
export type BinField = `${RangeField}Bin`;

/** Figures that stand in one column only within one scale: one bench version, protocol and baseline unit. */
export const SCALED_FIELDS = ["levelDba", "deltaTK"] as const;
/** Names the scale of a document's absolute figures; a filter on it must accompany a sort or range by one of them. */
export const SCALE_FIELD = "scale";

export const SORT_FIELDS = [
  ...RANGE_FIELDS.map((range) => range.field),
  ...SCALED_FIELDS,
  "rank",
  "publishedAtMs",
  "designName",
] as const;

/** Fields that an answer may show; all of them are public. */
export const SHOWN_FIELDS = [
  DOCUMENT_KEY,
  "rev",
  "slug",
  ...SEARCHED_FIELDS,
  ...FACET_FIELDS,
  ...RANGE_FIELDS.map((range) => range.field),
  ...RANGE_FIELDS.map((range) => `${range.field}U95` as const),
  ...SCALED_FIELDS,
  ...SCALED_FIELDS.map((field) => `${field}U95` as const),
  SCALE_FIELD,
  "rank",
  "rankLow",
  "rankHigh",
  "publishedAtMs",
] as const;

/** Lower edge of the bin that a value falls in, in the value's unit; a value on an edge opens the bin above it. */
export function binStart(value: number, binWidth: number): number {
  return Number((Math.floor(value / binWidth + 1e-9) * binWidth).toFixed(6));
}

/**
 * Settings of the index. Sort stands before words, so that a chosen order is strict; counts of facet values are
 * complete up to the limit, most frequent first; totals are counted to the end. Revision letters and handles are
 * spelled exactly.
 */
export const INDEX_SETTINGS = {
  searchableAttributes: [...SEARCHED_FIELDS],
  filterableAttributes: [
    DOCUMENT_KEY,
    "slug",
    SCALE_FIELD,
    "publishedAtMs",
    ...FACET_FIELDS,
    ...SCALED_FIELDS,
    ...RANGE_FIELDS.flatMap((range) => [range.field, `${range.field}Bin`]),
  ],
  sortableAttributes: [...SORT_FIELDS],
  displayedAttributes: [...new Set(SHOWN_FIELDS)],
  rankingRules: ["sort", "words", "typo", "proximity", "attributeRank", "wordPosition", "exactness"],
  faceting: { maxValuesPerFacet: 300, sortFacetValuesBy: { "*": "count" } },
  pagination: { maxTotalHits: 200_000 },
  typoTolerance: { disableOnAttributes: ["revision", "designerHandles"] },
} as const satisfies Settings;
