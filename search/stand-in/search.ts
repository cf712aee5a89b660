import { ServiceError, notSupported } from "./errors";
import { countFacets, searchFacet } from "./facets";
import { parseFilter } from "./filter-parse";
import { runFilter } from "./filter-run";
import { formatDocument, matchPositions } from "./format";
import type { Document } from "./paths";
import { project } from "./paths";
import { distinctOf, rank, readSort } from "./rank";
import type { HitScore } from "./score";
import { scorerOf } from "./score";
import type { SearchIndex } from "./search-index";
import type { FacetSearchParams, SearchParams } from "./search-params";
import type { TextMatch } from "./text-match";
import { matchText } from "./text-match";

/** Text matches of one request, so that queries that share a text on an index match it once. */
export type TextCache = Map<string, TextMatch | undefined>;
export type SearchOptions = { allowContains: boolean; texts: TextCache; now: () => number; requestUid: string };

/** The documents that a search finds, in order; with their scores when it asks for any. */
export type Found = {
  ordered: Int32Array;
  /** The same documents, ascending. */
  candidates: Int32Array;
  match: TextMatch | undefined;
  scores: ReadonlyMap<number, HitScore> | undefined;
};

/** Finds and orders the documents of a search, at least the first `wanted`. */
export function find(index: SearchIndex, params: SearchParams, options: SearchOptions, wanted: number): Found {
  const sort = readSort(params.sort, index);
  const distinct = readDistinct(index, params.distinct);
  const { match, candidates: all } = selectCandidates(index, params, options);
  if (asksForScores(params)) return findScored(index, params, match, all, distinct);
  if (distinct === null) {
    return { ordered: rank(all, index, match, sort, wanted), candidates: all, match, scores: undefined };
  }
  const ordered = distinctOf(rank(all, index, match, sort, all.length), index.column(distinct));
  return { ordered, candidates: ordered.slice().sort(), match, scores: undefined };
}

function asksForScores(params: SearchParams): boolean {
  return params.showRankingScore || params.showRankingScoreDetails || params.rankingScoreThreshold !== null;
}

/** Where nothing but words orders the documents, their scores do; those below the threshold are left out. */
function findScored(
  index: SearchIndex,
  params: SearchParams,
  match: TextMatch | undefined,
  all: Int32Array,
  distinct: string | null,
): Found {
  const sort = readSort(params.sort, index);
  const isSorted = sort.length > 0 || index.settings.rankingRules.some((rule) => rule.includes(":"));
  if (isSorted && params.showRankingScoreDetails) {
    throw notSupported("Score details of a sorted search", "invalid_search_show_ranking_score_details");
  }
  const score = scorerOf(index, params, match);
  const scores = new Map(Array.from(all, (slot) => [slot, score(slot)] as const));
  const figure = (slot: number): number => scores.get(slot)?.score ?? 0;
  const least = params.rankingScoreThreshold ?? 0;
  const kept = all.filter((slot) => figure(slot) >= least);
  let ordered = rank(kept, index, match, sort, kept.length);
  if (!isSorted) ordered = ordered.sort((a, b) => figure(b) - figure(a) || a - b);
  if (distinct !== null) ordered = distinctOf(ordered, index.column(distinct));
  return { ordered, candidates: ordered.slice().sort(), match, scores };
}

/** Runs one search and gives the answer's body. */
export function search(index: SearchIndex, params: SearchParams, options: SearchOptions): Record<string, unknown> {
  const start = options.now();
  const isPaged = params.page !== null || params.hitsPerPage !== null;
  const page = params.page ?? 1;
  const hitsPerPage = params.hitsPerPage ?? 20;
  const { maxTotalHits } = index.settings.pagination;
  const first = Math.min(isPaged ? Math.max(0, page - 1) * hitsPerPage : params.offset, maxTotalHits);
  const asked = isPaged ? (page === 0 ? 0 : hitsPerPage) : params.limit;
  const end = Math.min(first + asked, maxTotalHits);
  const found = find(index, params, options, end);
  const hits = Array.from(found.ordered.slice(first, end), (slot) => makeHit(index, slot, params, found));
  const total = Math.min(found.candidates.length, maxTotalHits);
  const paging = isPaged
    ? { hitsPerPage, page, totalPages: hitsPerPage === 0 ? 0 : Math.ceil(total / hitsPerPage), totalHits: total }
    : { limit: params.limit, offset: params.offset, estimatedTotalHits: total };
  const facets = params.facets === null ? {} : countFacets(index, found.candidates, params.facets);
  return {
    hits,
    query: params.q ?? "",
    processingTimeMs: Math.floor(options.now() - start),
    ...paging,
    ...facets,
    requestUid: options.requestUid,
  };
}

/** Runs one search for values of a facet and gives the answer's body. */
export function facetSearch(
  index: SearchIndex,
  params: FacetSearchParams,
  options: SearchOptions,
): Record<string, unknown> {
  const start = options.now();
  const { candidates } = selectCandidates(index, params, options);
  return {
    facetHits: searchFacet(index, params.facetName, params.facetQuery, candidates),
    facetQuery: params.facetQuery,
    processingTimeMs: Math.floor(options.now() - start),
  };
}

/** Slots that pass the filter and match the text, ascending. */
function selectCandidates(
  index: SearchIndex,
  params: SearchParams,
  options: SearchOptions,
): { match: TextMatch | undefined; candidates: Int32Array } {
  const match = textOf(index, params, options.texts);
  const filter = parseWithIndex(index, params.filter);
  const slots = index.slots;
  let mask = index.liveMask;
  if (filter !== undefined) {
    try {
      mask = runFilter(filter, index.filterContext("invalid_search_filter", options.allowContains));
    } catch (error) {
      throw error instanceof ServiceError ? error.prefixed(`Index \`${index.uid}\`: `) : error;
    }
  }
  const found = new Int32Array(slots);
  let count = 0;
  for (let slot = 0; slot < slots; slot += 1) {
    if (mask[slot] === 1 && (match === undefined || match.matched[slot] === 1)) {
      found[count] = slot;
      count += 1;
    }
  }
  return { match, candidates: found.subarray(0, count) };
}

const parseWithIndex = (index: SearchIndex, value: unknown): ReturnType<typeof parseFilter> => {
  try {
    return parseFilter(value, "invalid_search_filter");
  } catch (error) {
    throw error instanceof ServiceError ? error.prefixed(`Index \`${index.uid}\`: `) : error;
  }
};

function textOf(index: SearchIndex, params: SearchParams, texts: TextCache): TextMatch | undefined {
  const rules = index.textRules(params.attributesToSearchOn);
  if (params.q === null || params.q.trim() === "") return undefined;
  const key = JSON.stringify([index.uid, params.q, params.matchingStrategy, params.attributesToSearchOn]);
  if (!texts.has(key)) {
    const source = { slots: index.slots, postings: index.words(), document: (slot: number) => index.documents[slot] };
    texts.set(key, matchText(params.q, source, rules, params.matchingStrategy));
  }
  return texts.get(key);
}

function readDistinct(index: SearchIndex, asked: string | null): string | null {
  if (asked === null) return index.settings.distinctAttribute;
  if (index.isFilterable(asked)) return asked;
  const patterns = index.filterablePatterns();
  const hint =
    patterns.length === 0
      ? "This index does not have configured filterable attributes."
      : `Available filterable attributes patterns are: \`${patterns.join(", ")}\`.`;
  throw new ServiceError(
    "invalid_search_distinct",
    `Index \`${index.uid}\`: Attribute \`${asked}\` is not filterable and thus, cannot be used as distinct attribute. ${hint}`,
  );
}

/** One hit as it is shown. */
export function makeHit(index: SearchIndex, slot: number, params: SearchParams, found: Found): Document {
  const displayed = project(index.documents[slot] ?? {}, index.settings.displayedAttributes);
  const hit: Record<string, unknown> = { ...project(displayed, params.attributesToRetrieve) };
  const shown = found.match?.shown ?? [];
  const score = found.scores?.get(slot);
  if (params.retrieveVectors) hit._vectors = {};
  if (params.attributesToHighlight.length > 0 || params.attributesToCrop.length > 0) {
    const format = {
      highlight: params.attributesToHighlight,
      crop: params.attributesToCrop,
      cropLength: params.cropLength,
      cropMarker: params.cropMarker,
      preTag: params.highlightPreTag,
      postTag: params.highlightPostTag,
    };
    hit._formatted = formatDocument(displayed, params.attributesToRetrieve, format, shown);
  }
  if (params.showMatchesPosition) hit._matchesPosition = matchPositions(displayed, shown);
  if (params.showRankingScore && score !== undefined) hit._rankingScore = score.score;
  if (params.showRankingScoreDetails && score !== undefined) hit._rankingScoreDetails = score.details;
  return hit as Document;
}
