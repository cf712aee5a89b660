import type { SentenceMore, SentencePart, SentencePiece } from "@/components/ui/sentence/pieces";
import {
  endNames,
  facets,
  indexAddress,
  ranges,
  type FacetKey,
  type IndexAnswer,
  type IndexQuery,
  type RangeKey,
} from "@/lib/contracts/index-query";
import { boundsWords, chosenWords, valueLabel } from "./facet-words";
import { addedFacets, addedRanges, alwaysThere, type FacetPlace, type RangePlace } from "./sentence-plan";

export type SentenceInput = {
  /** As settled: what can't be asked has gone. */
  query: IndexQuery;
  answer: Pick<IndexAnswer, "facets" | "histograms">;
  seasonTitles: Readonly<Record<string, string>>;
  /** The part that the address opens. */
  open: string | undefined;
};

const countedInOrder: readonly FacetKey[] = ["stages", "blades1", "blades2", "struts"];

function facetOptions({ query, answer, seasonTitles }: SentenceInput, facet: FacetKey) {
  const counts = answer.facets[facet] ?? [];
  const chosen = query.facets[facet] ?? [];
  // What was chosen stays to be taken back, also where nothing has it now.
  const gone = chosen.filter((value) => !counts.some((each) => each.value === value));
  const all = [...counts, ...gone.map((value) => ({ value, count: 0 }))];
  if (countedInOrder.includes(facet)) all.sort((a, b) => Number(a.value) - Number(b.value));
  if (facet === "season") all.sort((a, b) => b.value.localeCompare(a.value, "en", { numeric: true }));
  return all.map(({ value, count }) => ({ value, count, label: valueLabel(facet, value, seasonTitles) }));
}

function facetPart(input: SentenceInput, { facet, any }: FacetPlace): SentencePart {
  const options = facetOptions(input, facet);
  const chosen = input.query.facets[facet] ?? [];
  const selected = options.map(({ value }) => value).filter((value) => chosen.includes(value));
  return {
    kind: "choices",
    name: facet,
    label: facets[facet].label,
    words: selected.length > 0 ? chosenWords(facet, selected, input.seasonTitles) : any,
    any: selected.length === 0,
    many: true,
    options,
    selected,
  };
}

function rangePart({ query, answer }: SentenceInput, range: RangeKey): SentencePart {
  const { label, unit, step } = ranges[range];
  const bounds = query.ranges[range] ?? { low: null, high: null };
  const { from, to } = endNames(range);
  return {
    kind: "range",
    label,
    words: boundsWords(range, bounds),
    any: bounds.low === null && bounds.high === null,
    fromName: from,
    toName: to,
    unit,
    from: bounds.low ?? undefined,
    to: bounds.high ?? undefined,
    bins: (answer.histograms[range] ?? []).map((bin) => ({
      from: bin.from,
      to: Number((bin.from + step).toFixed(6)),
      count: bin.count,
    })),
  };
}

const text = (words: string): SentencePiece[] => (words === "" ? [] : [{ kind: "text", text: words }]);

function facetPieces(input: SentenceInput, place: FacetPlace): SentencePiece[] {
  const one = place.facet === "rotation" && (input.query.facets.rotation ?? []).join() === "single";
  return [...text(place.before), facetPart(input, place), ...text(one ? " stage" : place.after)];
}

const rangePieces = (input: SentenceInput, place: RangePlace): SentencePiece[] => [
  ...text(place.before),
  rangePart(input, place.range),
  ...text(place.after),
];

/** The sentence as the question stands. Parts that were added are those with a choice and the one being opened. */
export function sentencePieces(input: SentenceInput): SentencePiece[] {
  const { query, open } = input;
  const isAdded = (facet: FacetKey) => (query.facets[facet] ?? []).length > 0 || open === facet;
  const isBounded = (range: RangeKey) => query.ranges[range] !== undefined || open === endNames(range).from;
  return [
    ...alwaysThere.flatMap((place) => facetPieces(input, place)),
    ...addedFacets.filter(({ facet }) => isAdded(facet)).flatMap((place) => facetPieces(input, place)),
    ...addedRanges.filter(({ range }) => isBounded(range)).flatMap((place) => rangePieces(input, place)),
    ...text(query.q ? `, with “${query.q}” in name, designer or traits.` : "."),
  ];
}

/** Parts that could be added: those with something to choose from that don't stand in the sentence yet. */
export function furtherParts(input: SentenceInput): SentenceMore[] {
  const { query, answer, open } = input;
  const address = indexAddress({ ...query, page: 1 });
  const opening = (key: string) => `${address}${address.includes("?") ? "&" : "?"}open=${key}`;
  const further = addedFacets.filter(
    ({ facet }) => !query.facets[facet]?.length && open !== facet && (answer.facets[facet] ?? []).length > 1,
  );
  const furtherRanges = addedRanges.filter(
    ({ range }) => !query.ranges[range] && open !== endNames(range).from && (answer.histograms[range] ?? []).length > 1,
  );
  return [
    ...further.map(({ facet }) => ({ label: facets[facet].label, href: opening(facet) })),
    ...furtherRanges.map(({ range }) => ({ label: ranges[range].label, href: opening(endNames(range).from) })),
  ];
}
