import { FACET_FIELDS, RANGE_FIELDS, binStart } from "@/search/settings";

/** Repeatable numbers in [0, 1) from a seed (mulberry32, public domain). */
export function seeded(seed: number): () => number {
  let state = seed >>> 0;
  return () => {
    state = (state + 0x6d2b79f5) >>> 0;
    let mixed = Math.imul(state ^ (state >>> 15), state | 1);
    mixed ^= mixed + Math.imul(mixed ^ (mixed >>> 7), mixed | 61);
    return ((mixed ^ (mixed >>> 14)) >>> 0) / 4_294_967_296;
  };
}

const SYLLABLES = [
  "ta",
  "re",
  "mi",
  "lo",
  "su",
  "ven",
  "kor",
  "dal",
  "pe",
  "quill",
  "os",
  "ier",
  "mar",
  "lin",
  "hero",
  "wing",
];

/** A word of the invented vocabulary; low numbers are drawn more often, roughly as words of a language are. */
export function inventedWord(random: () => number, vocabulary = 30_000): string {
  let number = Math.floor(vocabulary ** random());
  let word = "";
  do {
    word += SYLLABLES[number % SYLLABLES.length] ?? "";
    number = Math.floor(number / SYLLABLES.length);
  } while (number > 0);
  return word;
}

const CARDINALITY: Readonly<Record<string, number>> = {
  designer: 2000,
  season: 12,
  blades1: 14,
  blades2: 14,
};

/** One invented index document of the product's shape. */
export function inventedDocument(id: number, random: () => number): Record<string, unknown> {
  const words = (count: number): string => Array.from({ length: count }, () => inventedWord(random)).join(" ");
  const facets = FACET_FIELDS.map((field) => [field, `${field}-${Math.floor(random() * (CARDINALITY[field] ?? 6))}`]);
  const ranges = RANGE_FIELDS.flatMap(({ field, binWidth }) => {
    const value = Number((random() * 40 * binWidth).toFixed(4));
    return [
      [field, value],
      [`${field}Bin`, binStart(value, binWidth)],
    ];
  });
  return {
    id,
    name: words(2),
    letter: "ABCDEF"[id % 6],
    seasonTitle: `Season ${1 + (id % 12)}`,
    traitWords: words(30),
    rank: 1 + (id % 100),
    published: 1_700_000_000_000 + id * 60_000,
    scale: `scale-${id % 5}`,
    ...Object.fromEntries([...facets, ...ranges]),
  };
}
