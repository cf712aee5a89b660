import type { ComparedHead } from "@/lib/contracts/compare";

/** "Heronwing B", with its season where the same revision stands here twice. */
export function nameOf(entry: ComparedHead, all: readonly ComparedHead[]): string {
  const name = `${entry.name} ${entry.letter}`;
  const twice = all.filter((each) => each.slug === entry.slug && each.letter === entry.letter).length > 1;
  return twice ? `${name} (${entry.seasonTitle})` : name;
}

/** The page's address: names in the order in which they are drawn, and the level where one was chosen. */
export function compareAddress(tokens: readonly string[], levelDba?: number): string {
  const level = levelDba === undefined ? "" : `&level=${levelDba}`;
  return tokens.length === 0 ? "/compare" : `/compare?entries=${tokens.join(",")}${level}`;
}
