"use client";

import { useRouter } from "next/navigation";
import { useState, useTransition } from "react";
import { partKey, partParams, type SentencePart, type SentencePiece } from "./pieces";

export type Param = readonly [string, string];

/** The pieces as changed but not yet answered, and the move to the address that says the same. */
export function useSentenceAddress(action: string, pieces: readonly SentencePiece[], kept: readonly Param[]) {
  const router = useRouter();
  const [pending, start] = useTransition();
  const [draft, setDraft] = useState<{ over: readonly SentencePiece[]; part: SentencePart }[]>([]);

  // A draft lies over the answer that it was made on; the next answer from the server replaces it.
  const drafts = draft.filter(({ over }) => over === pieces);
  const shown = pieces.map((piece) => {
    if (piece.kind === "text") return piece;
    return drafts.findLast(({ part }) => partKey(part) === partKey(piece))?.part ?? piece;
  });

  const change = (part: SentencePart) => {
    const next = shown.map((piece) => (piece.kind !== "text" && partKey(piece) === partKey(part) ? part : piece));
    setDraft([...drafts, { over: pieces, part }]);
    const params = next.flatMap((piece) => (piece.kind === "text" ? [] : partParams(piece)));
    const query = new URLSearchParams([...kept, ...params].map(([name, value]) => [name, value])).toString();
    start(() => router.push(query ? `${action}?${query}` : action, { scroll: false }));
  };

  return { shown, change, pending };
}
