import type { HistogramBin } from "@/components/ui/small-histogram";

export type SentenceText = { kind: "text"; text: string };

export type SentenceChoices = {
  kind: "choices";
  /** The parameter in the address; chosen values repeat it. */
  name: string;
  /** Heads the strip of choices: "Blades, first stage". */
  label: string;
  /** What the underlined part says now: "7, 9 or 11". */
  words: string;
  /** Nothing is chosen: the part says "any". */
  any?: boolean;
  /** Several may be chosen, or one. */
  many: boolean;
  options: readonly { value: string; label: string; count?: number }[];
  selected: readonly string[];
};

export type SentenceRange = {
  kind: "range";
  label: string;
  words: string;
  any?: boolean;
  /** Parameters in the address for the two ends. */
  fromName: string;
  toName: string;
  unit: string;
  from?: number;
  to?: number;
  bins: readonly HistogramBin[];
};

export type SentencePart = SentenceChoices | SentenceRange;
export type SentencePiece = SentenceText | SentencePart;

/** A part that may be added: the address with it. */
export type SentenceMore = { label: string; href: string };

/** The key of a part: what opens it. */
export function partKey(part: SentencePart): string {
  return part.kind === "choices" ? part.name : part.fromName;
}

/** The parameters that a part puts into the address as it stands; empty ends and nothing chosen put none. */
export function partParams(part: SentencePart): readonly (readonly [string, string])[] {
  if (part.kind === "choices") return part.selected.map((value) => [part.name, value] as const);
  const ends = [
    [part.fromName, part.from],
    [part.toName, part.to],
  ] as const;
  return ends.flatMap(([name, value]) => (value === undefined ? [] : [[name, String(value)] as const]));
}
