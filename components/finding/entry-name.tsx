import type { ReactNode } from "react";
import type { IndexItem } from "@/lib/contracts/index-query";

/** "Heronwing B". */
export const entryName = ({ name, letter }: Pick<IndexItem, "name" | "letter">) => `${name} ${letter}`;

export type Piece = { text: string; hit: boolean };

/** A text with what was typed marked in it, where the search service found it there; the plain text otherwise. */
export function markedWords(plain: string, pieces: readonly Piece[] | undefined): ReactNode {
  if (!pieces || pieces.map((piece) => piece.text).join("") !== plain) return plain;
  return pieces.map(({ text, hit }, index) =>
    hit ? (
      <mark key={index} className="found-mark">
        {text}
      </mark>
    ) : (
      text
    ),
  );
}

/** The name with its revision's letter, marked. */
export function nameWords(item: IndexItem, pieces: readonly Piece[] | undefined): ReactNode {
  return (
    <>
      {markedWords(item.name, pieces)} {item.letter}
    </>
  );
}
