import { ServiceError, notSupported } from "./errors";
import type { FacetAnswer } from "./facets";
import { countFacets } from "./facets";
import { isRecord } from "./paths";
import type { Found, SearchOptions } from "./search";
import { find, makeHit } from "./search";
import type { SearchIndex } from "./search-index";
import type { SearchParams } from "./search-params";
import { readSearch } from "./search-params";

export type Federation = {
  limit: number;
  offset: number;
  facetsByIndex: ReadonlyMap<string, string[]>;
  /** Null keeps the facets of each index apart; Infinity merges all values. */
  mergeValuesMax: number | null;
};
export type FederatedQuery = { index: SearchIndex; params: SearchParams; weight: number };
type Candidate = { query: FederatedQuery; position: number; found: Found; slot: number; score: number };

const FIELDS = ["limit", "offset", "facetsByIndex", "mergeFacets"];

/** Reads `federation` of a multi-search. */
export function readFederation(value: Record<string, unknown>): Federation {
  const odd = Object.keys(value).find((field) => !FIELDS.includes(field));
  if (odd !== undefined) throw notSupported(`\`federation.${odd}\``);
  const { limit, offset } = readSearch({ limit: value.limit ?? 20, offset: value.offset ?? 0 });
  const byIndex = isRecord(value.facetsByIndex) ? value.facetsByIndex : {};
  const facets = Object.entries(byIndex).map(([uid, names]): [string, string[]] => [
    uid,
    readSearch({ facets: names }).facets ?? [],
  ]);
  const merge = isRecord(value.mergeFacets) ? value.mergeFacets : null;
  const { maxValuesPerFacet } = merge ?? {};
  if (maxValuesPerFacet !== undefined && maxValuesPerFacet !== null && !Number.isInteger(maxValuesPerFacet)) {
    throw new ServiceError(
      "invalid_multi_search_max_values_per_facet",
      "Invalid value type at `.federation.mergeFacets.maxValuesPerFacet`: expected a positive integer",
    );
  }
  const most = typeof maxValuesPerFacet === "number" ? maxValuesPerFacet : Infinity;
  return { limit, offset, facetsByIndex: new Map(facets), mergeValuesMax: merge === null ? null : most };
}

/** What a query's scores are multiplied by: `federationOptions.weight`, 0 or more, 1 when it isn't given. */
export function readWeight(options: unknown): number {
  if (options === undefined || options === null) return 1;
  const { weight, ...others } = isRecord(options) ? options : { weight: options };
  const odd = Object.keys(others)[0];
  if (odd !== undefined) throw notSupported(`\`federationOptions.${odd}\``);
  if (weight === undefined || weight === null) return 1;
  if (typeof weight === "number" && weight >= 0) return weight;
  throw new ServiceError(
    "invalid_multi_search_weight",
    `Invalid value at \`.federationOptions.weight\`: the value of \`weight\` is invalid, expected a positive float (>= 0.0).`,
  );
}

/** Refuses in a federated query what the service takes for all queries together, and what isn't compared here. */
export function checkFederated({ index, params }: FederatedQuery, body: Record<string, unknown>, i: number): void {
  const paging = ["limit", "offset", "page", "hitsPerPage"].find((name) => body[name] != null);
  if (paging !== undefined) {
    throw new ServiceError(
      "invalid_multi_search_query_pagination",
      `Using pagination options is not allowed in federated queries.\n - Hint: remove \`${paging}\` from query #${i} or remove \`federation\` from the request\n - Hint: pass \`federation.limit\` and \`federation.offset\` for pagination in federated search`,
    );
  }
  if (params.facets !== null) {
    throw new ServiceError(
      "invalid_multi_search_query_facets",
      `Using facet options is not allowed in federated queries.\n - Hint: remove \`facets\` from query #${i} or remove \`federation\` from the request\n - Hint: pass \`federation.facetsByIndex.${index.uid}: ${JSON.stringify(params.facets)}\` for facets in federated search`,
    );
  }
  const { rankingRules, distinctAttribute } = index.settings;
  if (params.sort.length > 0 || rankingRules.some((rule) => rule.includes(":"))) {
    throw notSupported("Sorting in a federated search", "invalid_search_sort");
  }
  if (params.distinct !== null || distinctAttribute !== null) {
    throw notSupported("A distinct attribute in a federated search", "invalid_search_distinct");
  }
}

/** All queries' hits in one list, best weighted score first; a document that several find counts once, at its best. */
export function federate(
  queries: readonly FederatedQuery[],
  federation: Federation,
  options: SearchOptions,
): Record<string, unknown> {
  const start = options.now();
  const all = queries.flatMap((query, position): Candidate[] => {
    const params = { ...query.params, showRankingScore: true };
    const found = find(query.index, params, options, 0);
    return Array.from(found.ordered, (slot) => {
      const score = (found.scores?.get(slot)?.score ?? 0) * query.weight;
      return { query, position, found, slot, score };
    });
  });
  all.sort((a, b) => b.score - a.score || a.position - b.position);
  const slotsByIndex = new Map<SearchIndex, Set<number>>();
  const kept = all.filter(({ query, slot }) => {
    const slots = slotsByIndex.get(query.index) ?? new Set();
    slotsByIndex.set(query.index, slots);
    const isNew = !slots.has(slot);
    slots.add(slot);
    return isNew;
  });
  const { limit, offset } = federation;
  const hits = kept.slice(offset, offset + limit).map(({ query, position, found, slot, score }) => ({
    ...makeHit(query.index, slot, query.params, found),
    _federation: { indexUid: query.index.uid, queriesPosition: position, weightedRankingScore: score },
  }));
  return {
    hits,
    processingTimeMs: Math.floor(options.now() - start),
    limit,
    offset,
    estimatedTotalHits: kept.length,
    ...facetsOf(queries, slotsByIndex, federation),
    requestUid: options.requestUid,
  };
}

function facetsOf(
  queries: readonly FederatedQuery[],
  slotsByIndex: ReadonlyMap<SearchIndex, ReadonlySet<number>>,
  { facetsByIndex, mergeValuesMax }: Federation,
): Record<string, unknown> {
  const answers: [string, FacetAnswer][] = [];
  for (const [uid, names] of facetsByIndex) {
    const index = queries.find((query) => query.index.uid === uid)?.index;
    if (index === undefined) continue;
    const slots = Int32Array.from(slotsByIndex.get(index) ?? []).sort();
    answers.push([uid, countFacets(index, slots, names)]);
  }
  if (answers.length === 0) return {};
  if (mergeValuesMax !== null) {
    return mergeFacets(
      answers.map(([, answer]) => answer),
      mergeValuesMax,
    );
  }
  const shown = answers.map(([uid, { facetDistribution, facetStats }]): [string, unknown] => [
    uid,
    { distribution: facetDistribution, stats: facetStats },
  ]);
  return { facetsByIndex: Object.fromEntries(shown) };
}

/** Counts added up and ranges joined; values in the order of the alphabet, at most `valuesMax` a facet. */
function mergeFacets(answers: readonly FacetAnswer[], valuesMax: number): FacetAnswer {
  const merged: FacetAnswer = { facetDistribution: {}, facetStats: {} };
  for (const { facetDistribution, facetStats } of answers) {
    for (const [name, values] of Object.entries(facetDistribution)) {
      const sums = (merged.facetDistribution[name] ??= {});
      for (const [value, count] of Object.entries(values)) sums[value] = (sums[value] ?? 0) + count;
    }
    for (const [name, { min, max }] of Object.entries(facetStats)) {
      const known = merged.facetStats[name] ?? { min, max };
      merged.facetStats[name] = { min: Math.min(known.min, min), max: Math.max(known.max, max) };
    }
  }
  for (const [name, sums] of Object.entries(merged.facetDistribution)) {
    const inOrder = Object.entries(sums).sort(([a], [b]) => (a < b ? -1 : 1));
    merged.facetDistribution[name] = Object.fromEntries(inOrder.slice(0, valuesMax));
  }
  return merged;
}
