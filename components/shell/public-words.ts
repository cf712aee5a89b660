export type StripWord = { href: string; word: string };

/** The words everybody sees; an operator's and a host's come after them. */
export const publicWords: readonly StripWord[] = [
  { href: "/designs", word: "Index" },
  { href: "/compare", word: "Compare" },
  { href: "/traits", word: "Traits" },
  { href: "/seasons", word: "Seasons" },
  { href: "/baselines", word: "Baselines" },
  { href: "/fit", word: "Fit" },
  { href: "/method", word: "Method" },
];
