import type { Settings } from "meilisearch";
import { facetKeys, rangeKeys, ranges, type RangeKey } from "@/lib/contracts/index-query";

/** Index that readers search; a rebuild fills another one under a name of its own and exchanges the two. */
export const DESIGNS_INDEX = "designs";
export const DOCUMENT_KEY = "id";

/** Searched fields, most important first. Never `*`: what isn't named here can't be found by its words. */
export const SEARCHED_FIELDS = ["name", "designer", "letter", "seasonTitle", "traitWords"] as const;
export type SearchedField = (typeof SEARCHED_FIELDS)[number];

/** Fields that are chosen by value: the facets of the index's question, under their own names. */
export const FACET_FIELDS = facetKeys;

/**
 * Numbers chosen by range, under the question's own names. Each has a companion field `…Bin` that holds the lower edge
 * of its bin of that width, so that a histogram is one facet count.
 */
export const RANGE_FIELDS = rangeKeys.map((field) => ({ field, binWidth: ranges[field].step }));

/** The field that holds the lower edge of a range's bin. */
export function binField(field: RangeKey): `${RangeKey}Bin` {
  return `${field}Bin`;
}

/** Figures that stand in one column only within one scale: one bench version, protocol and baseline unit. */
export const SCALED_FIELDS = ["leveldba", "deltat"] as const;
/** Names the scale of a document's absolute figures; how many scales the matches have is one facet count. */
export const SCALE_FIELD = "scale";

/** The document's key sorts last, so that ties stand in the same order as in the database. */
export const SORT_FIELDS = [...rangeKeys, ...SCALED_FIELDS, "rank", "published", "name", DOCUMENT_KEY] as const;

/** Fields that an answer may show. Rows are read again from the database: these serve highlights and comparisons. */
export const SHOWN_FIELDS = [DOCUMENT_KEY, "rev", ...SEARCHED_FIELDS] as const;

/** Lower edge of the bin that a value falls in, in the value's unit; a value on an edge opens the bin above it. */
export function binStart(value: number, binWidth: number): number {
  return Number((Math.floor(value / binWidth + 1e-9) * binWidth).toFixed(6));
}

/** Most values of a facet that are counted. */
export const FACET_VALUES_MAX = 300;

/**
 * Settings of the index. Sort stands before words, so that a chosen order is strict; counts of facet values are
 * complete up to the limit, most frequent first; totals are counted to the end. Revision letters and handles are
 * spelled exactly.
 */
export const INDEX_SETTINGS = {
  searchableAttributes: [...SEARCHED_FIELDS],
  filterableAttributes: [
    SCALE_FIELD,
    ...FACET_FIELDS,
    ...RANGE_FIELDS.flatMap(({ field }) => [field, binField(field)]),
    ...SCALED_FIELDS,
  ],
  sortableAttributes: [...SORT_FIELDS],
  displayedAttributes: [...SHOWN_FIELDS],
  rankingRules: ["sort", "words", "typo", "proximity", "attributeRank", "wordPosition", "exactness"],
  faceting: { maxValuesPerFacet: FACET_VALUES_MAX, sortFacetValuesBy: { "*": "count" } },
  pagination: { maxTotalHits: 200_000 },
  typoTolerance: { disableOnAttributes: ["letter", "designer"] },
} as const satisfies Settings;
