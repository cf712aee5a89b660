import { isRecord } from "./paths";

export type FilterableRule = {
  attributePatterns: string[];
  features?: { facetSearch?: boolean; filter?: { equality?: boolean; comparison?: boolean } };
};
export type IndexSettings = {
  displayedAttributes: string[];
  searchableAttributes: string[];
  filterableAttributes: (string | FilterableRule)[];
  sortableAttributes: string[];
  rankingRules: string[];
  stopWords: string[];
  nonSeparatorTokens: string[];
  separatorTokens: string[];
  dictionary: string[];
  synonyms: Record<string, string[]>;
  distinctAttribute: string | null;
  proximityPrecision: string;
  typoTolerance: {
    enabled: boolean;
    minWordSizeForTypos: { oneTypo: number; twoTypos: number };
    disableOnWords: string[];
    disableOnAttributes: string[];
    disableOnNumbers: boolean;
  };
  faceting: { maxValuesPerFacet: number; sortFacetValuesBy: Record<string, "alpha" | "count"> };
  pagination: { maxTotalHits: number };
  embedders: Record<string, never>;
  searchCutoffMs: number | null;
  localizedAttributes: { attributePatterns: string[]; locales: string[] }[] | null;
  facetSearch: boolean;
  prefixSearch: "indexingTime" | "disabled";
};
export type SettingName = keyof IndexSettings;

/** Settings of a new index. */
export function defaultSettings(): IndexSettings {
  return {
    displayedAttributes: ["*"],
    searchableAttributes: ["*"],
    filterableAttributes: [],
    sortableAttributes: [],
    rankingRules: ["words", "typo", "proximity", "attributeRank", "sort", "wordPosition", "exactness"],
    stopWords: [],
    nonSeparatorTokens: [],
    separatorTokens: [],
    dictionary: [],
    synonyms: {},
    distinctAttribute: null,
    proximityPrecision: "byWord",
    typoTolerance: {
      enabled: true,
      minWordSizeForTypos: { oneTypo: 5, twoTypos: 9 },
      disableOnWords: [],
      disableOnAttributes: [],
      disableOnNumbers: false,
    },
    faceting: { maxValuesPerFacet: 100, sortFacetValuesBy: { "*": "alpha" } },
    pagination: { maxTotalHits: 1000 },
    embedders: {},
    searchCutoffMs: null,
    localizedAttributes: null,
    facetSearch: true,
    prefixSearch: "indexingTime",
  };
}

/** Sub-routes of /settings: the path's last part and whether it is written by PATCH (merged) or PUT (replaced). */
export const SETTING_ROUTES: readonly { path: string; name: SettingName; method: "PUT" | "PATCH" }[] = [
  { path: "displayed-attributes", name: "displayedAttributes", method: "PUT" },
  { path: "searchable-attributes", name: "searchableAttributes", method: "PUT" },
  { path: "filterable-attributes", name: "filterableAttributes", method: "PUT" },
  { path: "sortable-attributes", name: "sortableAttributes", method: "PUT" },
  { path: "ranking-rules", name: "rankingRules", method: "PUT" },
  { path: "stop-words", name: "stopWords", method: "PUT" },
  { path: "non-separator-tokens", name: "nonSeparatorTokens", method: "PUT" },
  { path: "separator-tokens", name: "separatorTokens", method: "PUT" },
  { path: "dictionary", name: "dictionary", method: "PUT" },
  { path: "synonyms", name: "synonyms", method: "PUT" },
  { path: "distinct-attribute", name: "distinctAttribute", method: "PUT" },
  { path: "proximity-precision", name: "proximityPrecision", method: "PUT" },
  { path: "typo-tolerance", name: "typoTolerance", method: "PATCH" },
  { path: "faceting", name: "faceting", method: "PATCH" },
  { path: "pagination", name: "pagination", method: "PATCH" },
  { path: "embedders", name: "embedders", method: "PATCH" },
  { path: "search-cutoff-ms", name: "searchCutoffMs", method: "PUT" },
  { path: "localized-attributes", name: "localizedAttributes", method: "PUT" },
  { path: "facet-search", name: "facetSearch", method: "PUT" },
  { path: "prefix-search", name: "prefixSearch", method: "PUT" },
];

/** Settings after a change: null puts a setting back, objects of PATCH routes are merged key by key. */
export function applySettings(current: IndexSettings, change: Readonly<Record<string, unknown>>): IndexSettings {
  const next: Record<string, unknown> = { ...current };
  const defaults: Record<string, unknown> = defaultSettings();
  for (const [name, value] of Object.entries(change)) {
    if (value === undefined) continue;
    const isMerged = SETTING_ROUTES.some((route) => route.name === name && route.method === "PATCH");
    next[name] = value === null ? defaults[name] : isMerged ? merge(next[name], value, defaults[name]) : value;
  }
  const settings = next as IndexSettings;
  const byName = Object.entries(settings.faceting.sortFacetValuesBy).sort(([a], [b]) => (a < b ? -1 : 1));
  return {
    ...settings,
    stopWords: sorted(settings.stopWords),
    dictionary: sorted(settings.dictionary),
    separatorTokens: sorted(settings.separatorTokens),
    nonSeparatorTokens: sorted(settings.nonSeparatorTokens),
    sortableAttributes: sorted(settings.sortableAttributes),
    filterableAttributes: settings.filterableAttributes.every((each) => typeof each === "string")
      ? sorted(settings.filterableAttributes)
      : settings.filterableAttributes,
    faceting: { ...settings.faceting, sortFacetValuesBy: { "*": "alpha", ...Object.fromEntries(byName) } },
  };
}

function merge(current: unknown, change: unknown, fallback: unknown): unknown {
  if (change === null) return fallback;
  if (!isRecord(current) || !isRecord(change)) return change;
  const merged: Record<string, unknown> = { ...current };
  for (const [key, value] of Object.entries(change)) {
    if (value !== undefined) merged[key] = merge(current[key], value, isRecord(fallback) ? fallback[key] : undefined);
  }
  for (const [key, value] of Object.entries(merged)) if (value === undefined) delete merged[key];
  return merged;
}

/** The service keeps these as sets. */
function sorted<T extends string>(values: readonly T[]): T[] {
  return [...new Set(values)].sort();
}
