import { facetKeys, facets, rangeKeys, ranges, type IndexQuery } from "@/lib/contracts/index-query";
import { boundsWords, chosenWords } from "./facet-words";

/** A question in a few words, as a saved search is called until somebody names it: "blades, first stage 7 or 9, tip gap …". */
export function searchName(query: IndexQuery, seasonTitles: Readonly<Record<string, string>>): string {
  const parts = [
    ...(query.q ? [`“${query.q}”`] : []),
    ...facetKeys.flatMap((facet) => {
      const values = query.facets[facet] ?? [];
      if (values.length === 0) return [];
      if (facet === "season") return [chosenWords(facet, values, seasonTitles)];
      return [`${facets[facet].label.toLowerCase()} ${chosenWords(facet, values, seasonTitles)}`];
    }),
    ...rangeKeys.flatMap((range) => {
      const bounds = query.ranges[range];
      return bounds ? [`${ranges[range].label.toLowerCase()} ${boundsWords(range, bounds)}`] : [];
    }),
  ];
  const name = parts.length > 0 ? parts.join(", ") : "all entries";
  return name.length > 120 ? `${name.slice(0, 118)} …` : name;
}
