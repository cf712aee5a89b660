"use client";

import Link from "next/link";
import { usePathname } from "next/navigation";
import type { StripWord } from "./public-words";

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
