import Link from "next/link";
import type { ThemeChoice } from "./theme";
import { PrintAddress } from "./print-address";
import { ThemeSwitch } from "./theme-switch";

const words = [
  { href: "/method#cautions", word: "Cautions" },
  { href: "/method", word: "How it is measured" },
  { href: "/corrections", word: "Corrections" },
  { href: "/licences/atkinson-hyperlegible-next.txt", word: "Type: SIL OFL", file: true },
];

export type FootProps = {
  theme: ThemeChoice;
  /** The method version a print must carry, such as "method 3". */
  methodVersion?: string;
  /** Said on every page of the demo. */
  note?: string;
};

/** The sheet's lower edge. On paper it leaves the page's address and the method version. */
export function Foot({ theme, methodVersion, note }: FootProps) {
  return (
    <footer className="holes section perforated section-tight">
      <div className="foot">
        <nav aria-label="Foot">
          {words.map(({ href, word, file }) =>
            file ? (
              <a key={href} href={href}>
                {word}
              </a>
            ) : (
              <Link key={href} href={href}>
                {word}
              </Link>
            ),
          )}
        </nav>
        <ThemeSwitch start={theme} />
        {note ? <p className="small-print w-full">{note}</p> : null}
      </div>
      <PrintAddress methodVersion={methodVersion} />
    </footer>
  );
}
