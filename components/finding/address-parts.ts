import { endNames, facetKeys, indexAddress, rangeKeys, type IndexQuery } from "@/lib/contracts/index-query";

/** The parameters that the sentence itself puts into the address. */
export const sentenceNames: readonly string[] = [
  ...facetKeys,
  ...rangeKeys.flatMap((range) => Object.values(endNames(range))),
];

/** The address's parameters but some, for a form that sets those itself. */
export function paramsWithout(query: IndexQuery, names: readonly string[]): [string, string][] {
  const params = new URLSearchParams(indexAddress(query).split("?")[1] ?? "");
  return [...params].filter(([name]) => !names.includes(name));
}
