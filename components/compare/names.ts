import type { ComparedHead } from "@/lib/contracts/compare";

/** "Heronwing B", with its season where the same revision stands here twice. */
export function nameOf(entry: ComparedHead, all: readonly ComparedHead[]): string {
  const name = `${entry.name} ${entry.letter}`;
  const twice = all.filter((each) => each.slug === entry.slug && each.letter === entry.letter).length > 1;
  return twice ? `${name} (${entry.seasonTitle})` : name;
}
