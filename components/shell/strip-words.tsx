"use client";

import Link from "next/link";
import { usePathname } from "next/navigation";

export type StripWord = { href: string; word: string };

/** The words everybody sees; an operator's and a host's come after them. */
export const publicWords: readonly StripWord[] = [
  { href: "/designs", word: "Index" },
  { href: "/compare", word: "Compare" },
  { href: "/traits", word: "Traits" },
  { href: "/seasons", word: "Seasons" },
  { href: "/baselines", word: "Baselines" },
  { href: "/method", word: "Method" },
];

/** Plain words; the current one is underlined twice. */
export function StripWords({ words }: { words: readonly StripWord[] }) {
  const path = usePathname();
  return (
    <nav aria-label="Main" className="strip-words">
      {words.map(({ href, word }) => {
        const here = path === href;
        const within = path.startsWith(`${href}/`);
        return (
          <Link key={href} href={href} aria-current={here ? "page" : within ? "true" : undefined}>
            {word}
          </Link>
        );
      })}
    </nav>
  );
}
