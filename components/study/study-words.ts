import type { StudyAnswer } from "@/lib/contracts/study";
import { isYesNo, traitOf, type TraitKey } from "@/lib/domain/study/traits";
import { formatFrame } from "@/lib/format/frames";
import { formatNumber } from "@/lib/format/numbers";
import { formatRange } from "@/lib/format/quantities";

export type Result = StudyAnswer["result"];
export type EffectShown = Result["fit"]["effects"][number];
export type SpreadShown = Result["overall"];
export type LevelShown = { key: string; from?: number; to?: number };

/** What a figure is called in the sentence and over a chart. */
export const figureWords = {
  equal: { spoken: "ΔT/P at equal noise", short: "ΔT/P at equal noise", unit: "%" },
  level: { spoken: "level at full speed", short: "Level at full speed", unit: "dB" },
  resistance: { spoken: "ΔT/P at full speed", short: "ΔT/P at full speed", unit: "%" },
} as const;

const levelNames: Partial<Record<TraitKey, Readonly<Record<string, string>>>> = {
  inlet: { none: "no stack" },
  hand: { left: "left", right: "right" },
};

const decimalsOf = (trait: TraitKey) => {
  const { step } = traitOf(trait);
  return step < 1 ? 2 : Number.isInteger(step) && trait !== "pitch" && trait !== "spacer" ? 0 : 1;
};

/** A unit as it follows its number: the degree sign without a space (ISO 80000-1:2022, 7.1.4). */
export const unitAfter = (unit: string) => (unit === "" || unit === "°" ? unit : ` ${unit}`);

/** A trait's value for people: "7", "0.8 mm", "120 × 25 mm", "no stack". */
export function valueWords(trait: TraitKey, value: string | number): string {
  const { unit } = traitOf(trait);
  if (typeof value === "number") {
    const decimals = Number.isInteger(value) ? 0 : decimalsOf(trait);
    return `${formatNumber(value, { decimals })}${unitAfter(unit)}`;
  }
  if (trait === "frame") return `${formatFrame(value)} mm`;
  return levelNames[trait]?.[value] ?? value;
}

/** A level for people: a name, a number, or a band, "0.4–0.8 mm". */
export function levelWords(trait: TraitKey, { key, from, to }: LevelShown): string {
  if (from === undefined || to === undefined) return valueWords(trait, key);
  if (from === to) return valueWords(trait, from);
  const { unit } = traitOf(trait);
  const decimals = [from, to].every((end) => Number.isInteger(end)) ? 0 : decimalsOf(trait);
  return `${formatRange(from, to, { decimals })}${unitAfter(unit)}`;
}

/** What an effect is of: "Tip gap, +0.1 mm", "Inlet stack: cone", "Shroud ring". */
export function effectName({ trait, level, step }: Pick<EffectShown, "trait" | "level" | "step">): string {
  const { label, unit } = traitOf(trait);
  if (level !== undefined) return isYesNo(trait) ? label : `${label}: ${valueWords(trait, level)}`;
  if (step === undefined) return label;
  return `${label}, +${formatNumber(step, { decimals: step < 1 ? 1 : 0 })}${unitAfter(unit)}`;
}

const shortLabels: Partial<Record<TraitKey, string>> = {
  blades: "Blades",
  blades2: "2nd blades",
  hand: "Hand",
  inlet: "Inlet",
  inletmm: "Inlet length",
  solidity: "Solidity",
  pitch: "Pitch",
};

/** The same, short enough for a chart's side on a phone: "Blades, +1", "Inlet: cone". */
export function chartName(effect: Pick<EffectShown, "trait" | "level" | "step">): string {
  const { label } = traitOf(effect.trait);
  return effectName(effect).replace(label, shortLabels[effect.trait] ?? label);
}

/** What a choice's effects are against: "against no stack". */
export function againstWords({ trait, reference }: Pick<EffectShown, "trait" | "reference">): string | undefined {
  return reference === undefined ? undefined : `against ${valueWords(trait, reference)}`;
}

/** Why an effect isn't given, as one sees it on the dash. */
export const whyWords: Readonly<Record<NonNullable<EffectShown["why"]>, string>> = {
  "too-few": "too few to tell: four entries on each side, or five points",
  "one-value": "all of these entries have the same",
  "varies-in-no-cell": "within no season, bench and protocol do entries differ in it",
  "not-apart": "can’t be told apart from the other traits (variance inflation over 10)",
  "too-few-rows": "too few entries for so many traits",
  "too-few-designers": "too few to tell: fewer than six designers",
  exact: "the figures leave no scatter to judge by",
};

/** "98.4 %" or "−0.6 dB", and a missing one as a dash. */
export function figureIn(unit: string, value: number | undefined, signed = false): string {
  if (value === undefined) return "–";
  return `${formatNumber(value, { decimals: unit === "%" ? 1 : 2, signed })} ${unit}`;
}

/** A probability: three decimals, and small ones as a bound. */
export function chanceWords(p: number): string {
  return p < 0.001 ? "under 0.001" : formatNumber(p, { decimals: 3 });
}
