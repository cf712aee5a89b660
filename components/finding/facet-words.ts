import { ranges, type FacetKey, type RangeKey } from "@/lib/contracts/index-query";
import { formatFrame } from "@/lib/format/frames";
import { formatNumber } from "@/lib/format/numbers";
import { listWords } from "@/lib/format/words";

type Titles = Readonly<Record<string, string>>;

const withOrWithout: Titles = { true: "with", false: "without" };
const yesOrNo: Titles = { true: "yes", false: "no" };

/** A value as a slot's label says it, and as the sentence says it where that differs. */
const labels: Partial<Record<FacetKey, Titles>> = {
  rotation: { single: "one", counter: "two, counter-rotating", co: "two, turning the same way" },
  spacer: yesOrNo,
  shroud: yesOrNo,
  tone: yesOrNo,
};
const spoken: Partial<Record<FacetKey, Titles>> = {
  rotation: { single: "one", counter: "two counter-rotating", co: "two same-way" },
  inlet: { none: "no" },
  spacer: withOrWithout,
  shroud: withOrWithout,
  tone: withOrWithout,
};

/** What a value is called; an address may say "constructor", which every object has and no list of titles does. */
const titleOf = (titles: Titles | undefined, value: string): string | undefined =>
  titles && Object.hasOwn(titles, value) ? titles[value] : undefined;

/** A facet's value for people: "two, counter-rotating", "120 × 25 mm", "Season 4". */
export function valueLabel(facet: FacetKey, value: string, seasonTitles: Titles): string {
  if (facet === "frame") return `${formatFrame(value)} mm`;
  if (facet === "season") return titleOf(seasonTitles, value) ?? value;
  return titleOf(labels[facet], value) ?? value;
}

/** The chosen values as the sentence says them: "7, 9 or 11". */
export function chosenWords(facet: FacetKey, values: readonly string[], seasonTitles: Titles): string {
  if (
    values.length === 2 &&
    values.every((value) => Object.hasOwn(withOrWithout, value)) &&
    spoken[facet] === withOrWithout
  )
    return "with or without";
  const words = values.map((value) => titleOf(spoken[facet], value) ?? valueLabel(facet, value, seasonTitles));
  return listWords(words, "or");
}

const places = (step: number) => (step >= 1 ? 0 : step >= 0.1 ? 1 : 2);

/** A range's bounds as the sentence says them: "0.5 to 1.0 mm", "1.0 mm or less". */
export function boundsWords(range: RangeKey, bounds: { low: number | null; high: number | null }): string {
  const { unit, step } = ranges[range];
  const write = (value: number) => {
    const shown = formatNumber(value, { decimals: places(step) });
    return Number(value.toFixed(places(step))) === value ? shown : String(value).replace("-", "−");
  };
  const after = unit === "" ? "" : ` ${unit}`;
  const { low, high } = bounds;
  if (low !== null && high !== null) return `${write(low)} to ${write(high)}${after}`;
  if (low !== null) return `${write(low)}${after} or more`;
  return high === null ? "any" : `${write(high)}${after} or less`;
}
