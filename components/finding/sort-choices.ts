import type { SortKey } from "@/lib/contracts/index-query";
import { columnWords, type IndexColumn } from "./columns";

export type SortChoice = { value: string; label: string };

/** Every way to sort what these columns hold, as the address writes it; signed figures from the coolest or quietest on. */
export function sortChoices(
  offered: readonly IndexColumn[],
  { distanceMm, words }: { distanceMm: number | undefined; words: string },
): SortChoice[] {
  const both = (sort: SortKey, label: string) => [
    { value: sort, label: `${label}: lowest first` },
    { value: `-${sort}`, label: `${label}: highest first` },
  ];
  return [
    ...(words === "" ? [] : [{ value: "match", label: "Best match first" }]),
    ...offered.flatMap((column) => (column.sort ? both(column.sort, columnWords(column, distanceMm)) : [])),
    { value: "name", label: "Name: A to Z" },
    { value: "-name", label: "Name: Z to A" },
    { value: "-published", label: "Published: newest first" },
    { value: "published", label: "Published: oldest first" },
  ];
}
