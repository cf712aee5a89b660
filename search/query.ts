import type { Meilisearch, MultiSearchParams, SearchResponse } from "meilisearch";
import type { FacetKey, IndexQuery, RangeKey } from "@/lib/contracts/index-query";
import { facetKeys, indexPageSize, rangeKeys, settledQuery } from "@/lib/contracts/index-query";
import {
  DESIGNS_INDEX,
  FACET_VALUES_MAX,
  SCALE_FIELD,
  SEARCHED_FIELDS,
  binField,
  type SearchedField,
} from "./settings";

type Query = MultiSearchParams["queries"][number];
type Strategy = "all" | "last";
type Group = FacetKey | RangeKey;

/** Private-use characters: no text holds them, and the page escapes everything else before it marks up. */
const MARK_BEGIN = "\uE000";
const MARK_END = "\uE001";

/** A piece of a searched field; `hit` where it answers what was typed. */
export interface Piece {
  text: string;
  hit: boolean;
}

export interface Found {
  /** Entries of the page, in order. */
  entryIds: string[];
  total: number;
  ofAll: number;
  /** Whether the matches share one bench version, protocol and baseline unit. */
  oneScale: boolean;
  facets: Record<string, { value: string; count: number }[]>;
  histograms: Record<string, { from: number; count: number }[]>;
  /** By entry and field, only where a word was found. */
  highlights: Record<string, Partial<Record<SearchedField, Piece[]>>>;
}

/** A value in a filter: quoted, with what would end the quotes escaped. Attributes come from lists of ours alone. */
function quoted(value: string): string {
  return `"${value.replace(/[\\"]/g, "\\$&")}"`;
}

/** Every condition of the question but one group's own; outer lists are joined by AND, inner ones by OR. */
export function indexFilter(query: IndexQuery, without?: Group): string[][] {
  const chosen = facetKeys.flatMap((facet): string[][] => {
    const values = facet === without ? [] : (query.facets[facet] ?? []);
    return values.length === 0 ? [] : [values.map((value) => `${facet} = ${quoted(value)}`)];
  });
  const bounded = rangeKeys.flatMap((range): string[][] => {
    const bounds = range === without ? undefined : query.ranges[range];
    if (!bounds) return [];
    const { low, high } = bounds;
    return [
      ...(low === null ? [] : [[`${range} >= ${quoted(String(low))}`]]),
      ...(high === null ? [] : [[`${range} <= ${quoted(String(high))}`]]),
    ];
  });
  return [...chosen, ...bounded];
}

const isChosen = (query: IndexQuery, group: Group): boolean =>
  (query.facets[group as FacetKey] ?? []).length > 0 || query.ranges[group as RangeKey] !== undefined;
const isRange = (group: Group): group is RangeKey => (rangeKeys as string[]).includes(group);
const counted = (group: Group): string => (isRange(group) ? binField(group) : group);

/**
 * The queries of one multi-search: the page with every filter and the counts of all groups without a choice; then one
 * a group with a choice, counted without its own filter; last, how many entries there are at all.
 */
export function indexQueries(query: IndexQuery, strategy: Strategy): { queries: Query[]; groups: Group[] } {
  const groups: Group[] = [...facetKeys, ...rangeKeys];
  const withChoice = groups.filter((group) => isChosen(query, group));
  const free = groups.filter((group) => !isChosen(query, group));
  const common = { indexUid: DESIGNS_INDEX, q: query.q, matchingStrategy: strategy };
  const page: Query = {
    ...common,
    filter: indexFilter(query),
    facets: [...free.map(counted), SCALE_FIELD],
    // Without an order of its own the service puts the best match first.
    ...(query.sort !== "match" && { sort: [`${query.sort}:${query.descending ? "desc" : "asc"}`, "id:asc"] }),
    page: query.page,
    hitsPerPage: indexPageSize,
    attributesToRetrieve: ["id", ...SEARCHED_FIELDS],
    ...(query.q !== "" && {
      attributesToHighlight: [...SEARCHED_FIELDS],
      highlightPreTag: MARK_BEGIN,
      highlightPostTag: MARK_END,
    }),
  };
  const own = withChoice.map((group): Query => ({
    ...common,
    filter: indexFilter(query, group),
    facets: [counted(group)],
    hitsPerPage: 0,
  }));
  return { queries: [page, ...own, { indexUid: DESIGNS_INDEX, q: "", hitsPerPage: 0 }], groups: withChoice };
}

/**
 * Asks the service: all words must be found; where that finds nothing, the last words may be missing. A question that
 * holds only on one scale is settled first: over several it is the answer to `settledQuery`, in one request; over one
 * it is asked again as it is.
 *
 * @throws the client's errors, also when the index is missing or has older settings
 */
export async function searchDesigns(client: Meilisearch, query: IndexQuery): Promise<Found> {
  const found = await settled(client, query, "all");
  return found.total === 0 && /\S\s+\S/.test(query.q) ? settled(client, query, "last") : found;
}

async function settled(client: Meilisearch, query: IndexQuery, strategy: Strategy): Promise<Found> {
  const anyScale = settledQuery(query, false);
  const found = await ask(client, anyScale, strategy);
  const holdsAnyway =
    anyScale.sort === query.sort && rangeKeys.every((key) => anyScale.ranges[key] === query.ranges[key]);
  if (!found.oneScale || holdsAnyway) return found;
  return { ...(await ask(client, query, strategy)), oneScale: true };
}

async function ask(client: Meilisearch, query: IndexQuery, strategy: Strategy): Promise<Found> {
  const { queries, groups } = indexQueries(query, strategy);
  const { results } = await client.multiSearch<{ queries: Query[] }, Record<string, unknown>>({ queries });
  const [page, ...rest] = results as unknown as SearchResponse<Record<string, unknown>>[];
  const all = rest[groups.length];
  if (!page || !all) throw new Error("the search service left a query unanswered");
  const distribution = (group: Group): Record<string, number> => {
    const at = groups.indexOf(group);
    return (at < 0 ? page : rest[at])?.facetDistribution?.[counted(group)] ?? {};
  };
  return {
    entryIds: page.hits.map((hit) => String(hit.id)),
    total: totalOf(page),
    ofAll: totalOf(all),
    oneScale: Object.keys(page.facetDistribution?.[SCALE_FIELD] ?? {}).length === 1,
    facets: Object.fromEntries(facetKeys.map((facet) => [facet, inOrder(distribution(facet))])),
    histograms: Object.fromEntries(rangeKeys.map((range) => [range, bins(distribution(range))])),
    highlights: query.q === "" ? {} : Object.fromEntries(page.hits.map((hit) => [String(hit.id), marked(hit)])),
  };
}

function totalOf(answer: { totalHits?: number }): number {
  if (answer.totalHits === undefined) throw new Error("the search service gave no total");
  return answer.totalHits;
}

/** Most frequent first, equal ones by value: JSON has no order of its own for keys that look like numbers. */
function inOrder(distribution: Record<string, number>): { value: string; count: number }[] {
  return Object.entries(distribution)
    .map(([value, count]) => ({ value, count }))
    .sort((a, b) => b.count - a.count || (a.value < b.value ? -1 : 1))
    .slice(0, FACET_VALUES_MAX);
}

function bins(distribution: Record<string, number>): { from: number; count: number }[] {
  return Object.entries(distribution)
    .map(([from, count]) => ({ from: Number(from), count }))
    .sort((a, b) => a.from - b.from);
}

function marked(hit: Record<string, unknown>): Partial<Record<SearchedField, Piece[]>> {
  const formatted = (hit._formatted ?? {}) as Record<string, unknown>;
  return Object.fromEntries(
    SEARCHED_FIELDS.flatMap((field) => {
      const value = formatted[field];
      const text = Array.isArray(value) ? value.join(", ") : value;
      return typeof text === "string" && text.includes(MARK_BEGIN) ? [[field, piecesOf(text)]] : [];
    }),
  );
}

/** Splits a marked text into pieces; joined again they are the text without marks. */
export function piecesOf(text: string): Piece[] {
  return text
    .split(MARK_BEGIN)
    .flatMap((part, n): Piece[] => {
      if (n === 0) return [{ text: part, hit: false }];
      const end = part.indexOf(MARK_END);
      if (end < 0) return [{ text: part, hit: true }];
      return [
        { text: part.slice(0, end), hit: true },
        { text: part.slice(end + 1), hit: false },
      ];
    })
    .filter((piece) => piece.text !== "");
}
