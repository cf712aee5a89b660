import type { Column } from "./column";
import { ServiceError, notSupported } from "./errors";
import { ownValue } from "./paths";
import type { SearchIndex } from "./search-index";
import { Vocabulary } from "./vocabulary";
import { tokenise } from "./words";

export type FacetAnswer = {
  facetDistribution: Record<string, Record<string, number>>;
  facetStats: Record<string, { min: number; max: number }>;
};
/** Facets times documents that one search may count: half a second or so; a facet costs as much as some documents. */
const FACET_WORK_MAX = 5e7;
const DOCUMENTS_PER_FACET = 1000;

export type FacetHit = { value: string; count: number };

/** Counts of the asked attributes over the listed documents, and the range of their numbers. */
export function countFacets(index: SearchIndex, slots: Int32Array, names: readonly string[]): FacetAnswer {
  const distributions: [string, Record<string, number>][] = [];
  const ranges: [string, { min: number; max: number }][] = [];
  const { maxValuesPerFacet } = index.settings.faceting;
  const paths = facetPaths(index, names);
  if (paths.length * (index.slots + DOCUMENTS_PER_FACET) > FACET_WORK_MAX)
    throw notSupported("Counting so many facets of so many documents");
  for (const path of paths) {
    const column = index.column(path);
    if (column.holders === 0) continue;
    const counts = new Uint32Array(column.size);
    column.count(slots, counts);
    const codes = chooseCodes(column, counts, maxValuesPerFacet, orderOf(index, path));
    const values = codes.map((code): [string, number] => [column.labels[code] as string, counts[code] as number]);
    distributions.push([path, Object.fromEntries(values)]);
    const stats = rangeOf(column, counts);
    if (stats !== undefined) ranges.push([path, stats]);
  }
  return { facetDistribution: Object.fromEntries(distributions), facetStats: Object.fromEntries(ranges) };
}

function facetPaths(index: SearchIndex, names: readonly string[]): string[] {
  const odd = names.filter((name) => name !== "*" && !index.isFilterable(name));
  if (odd.length > 0) {
    const patterns = index.filterablePatterns();
    const subject = odd.length === 1 ? `Attribute \`${odd[0]}\` is` : `Attributes \`${odd.join(", ")}\` are`;
    const hint =
      patterns.length === 0
        ? "This index does not have configured filterable attributes."
        : `Available filterable attributes patterns are: \`${patterns.join(", ")}\`.`;
    throw new ServiceError(
      "invalid_search_facets",
      `Index \`${index.uid}\`: Invalid facet distribution: ${subject} not filterable. ${hint}`,
    );
  }
  if (!names.includes("*")) return [...new Set(names)];
  const fields = [...index.fieldDistribution.keys()].filter((field) => index.isFilterable(field));
  const nested = index.filterablePatterns().filter((pattern) => pattern.includes(".") && !pattern.includes("*"));
  return [...new Set([...fields, ...nested])].sort();
}

function orderOf(index: SearchIndex, path: string): "alpha" | "count" {
  const by = index.settings.faceting.sortFacetValuesBy;
  return ownValue(by, path) ?? by["*"] ?? "alpha";
}

/** At most `limit` codes that occur: the first in order of value, or those that occur most, most first. */
function chooseCodes(column: Column, counts: Uint32Array, limit: number, order: "alpha" | "count"): number[] {
  const chosen: number[] = [];
  const byValue = column.inOrder();
  const least = order === "count" ? leastCount(counts, limit) : 1;
  for (const code of byValue) {
    if (order === "alpha" && chosen.length >= limit) break;
    if ((counts[code] as number) >= least) chosen.push(code);
  }
  if (order === "alpha") return chosen;
  return chosen.sort((a, b) => (counts[b] as number) - (counts[a] as number)).slice(0, limit);
}

/** Smallest count that a value among the `limit` most frequent has; 1 when fewer occur. */
function leastCount(counts: Uint32Array, limit: number): number {
  let most = 0;
  for (const count of counts) if (count > most) most = count;
  const having = new Uint32Array(most + 1);
  for (const count of counts) having[count] = (having[count] as number) + 1;
  let total = 0;
  for (let count = most; count > 0; count -= 1) {
    total += having[count] as number;
    if (total >= limit) return count;
  }
  return 1;
}

function rangeOf(column: Column, counts: Uint32Array): { min: number; max: number } | undefined {
  let min = Infinity;
  let max = -Infinity;
  for (let code = 0; code < counts.length; code += 1) {
    const number = column.numbers[code] as number;
    if (counts[code] === 0 || Number.isNaN(number)) continue;
    if (number < min) min = number;
    if (number > max) max = number;
  }
  return min === Infinity ? undefined : { min, max };
}

/**
 * Values of a string facet that begin with the typed text (typos forgiven as in a search), with their counts over
 * the listed documents. Null text lists all values.
 */
export function searchFacet(index: SearchIndex, path: string, text: string | null, slots: Int32Array): FacetHit[] {
  if (!index.settings.facetSearch) {
    throw new ServiceError("facet_search_disabled", "The facet search is disabled for this index");
  }
  if (!index.isFilterable(path)) {
    const patterns = index.filterablePatterns();
    const hint =
      patterns.length === 0
        ? "This index does not have configured facet-searchable attributes."
        : `Available facet-searchable attributes patterns are: \`${patterns.join(", ")}\`.`;
    throw new ServiceError(
      "invalid_facet_search_facet_name",
      `Attribute \`${path}\` is not facet-searchable. ${hint} To make it facet-searchable add it to the \`filterableAttributes\` index settings.`,
    );
  }
  const column = index.column(path);
  const counts = new Uint32Array(column.size);
  column.count(slots, counts);
  const wanted = text === null || text === "" ? undefined : matchingLabels(index, column, text);
  for (let code = 0; code < counts.length; code += 1) {
    const isString = Number.isNaN(column.numbers[code]);
    if (!isString || (wanted !== undefined && !wanted.has(plain(column.labels[code] as string)))) counts[code] = 0;
  }
  const codes = chooseCodes(column, counts, index.settings.faceting.maxValuesPerFacet, orderOf(index, path));
  return codes.map((code) => ({ value: column.labels[code] as string, count: counts[code] as number }));
}

function plain(value: string): string {
  return tokenise(value)
    .map((token) => token.word)
    .join(" ");
}

function matchingLabels(index: SearchIndex, column: Column, text: string): Set<string> {
  const word = plain(text);
  const { enabled, minWordSizeForTypos } = index.settings.typoTolerance;
  const length = Array.from(word).length;
  const maxTypos = !enabled
    ? 0
    : length >= minWordSizeForTypos.twoTypos
      ? 2
      : length >= minWordSizeForTypos.oneTypo
        ? 1
        : 0;
  const vocabulary = new Vocabulary(new Set(column.labels.map(plain)));
  return new Set(vocabulary.derive({ word, maxTypos, isPrefix: true }).map((each) => each.word));
}
