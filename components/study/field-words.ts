import type { OutcomeKey } from "@/lib/domain/study/outcomes";
import type { TraitKey } from "@/lib/domain/study/traits";
import { figureWords, valueWords } from "./study-words";

export type FieldName = { slug: string; name: string; letter: string; seasonTitle: string };
/** Public entries by id; what isn't public any more is missing. */
export type FieldNames = Readonly<Record<string, FieldName>>;

/** "B, Season 2" among entries of one design; the id for what isn't public any more. */
export function entryName(names: FieldNames, id: string): string {
  const name = names[id];
  return name ? `${name.letter}, ${name.seasonTitle}` : id;
}

/** A trait's value, "none" where there is none. */
export function worth(trait: TraitKey, value: string | number | null): string {
  return value === null ? "none" : valueWords(trait, value);
}

/** Decimals that a figure of the study is written with: percent to a tenth, decibels and kelvin to a hundredth. */
export function decimalsOfFigure(figure: OutcomeKey): number {
  return figureWords[figure].unit === "%" ? 1 : 2;
}
