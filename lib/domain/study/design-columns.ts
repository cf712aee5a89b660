import { MINIMUM } from "@/lib/science/statistics/minimum-counts";
import type { StudyEntry } from "./study-entry";
import { traitOf, type TraitKey } from "./traits";

/** Why an effect isn't given. */
export type Refusal =
  "too-few" | "one-value" | "varies-in-no-cell" | "not-apart" | "too-few-rows" | "too-few-designers" | "exact";

/** One column of the regression: a measure as it is, or 1 where a choice has this level and 0 at its reference. */
export interface DesignColumn {
  readonly key: string;
  readonly trait: TraitKey;
  readonly level?: string;
  readonly reference?: string;
  readonly step: number;
  readonly values: Float64Array;
  /** Entries that have the level; for a measure, all. */
  readonly n: number;
}

export interface Design {
  readonly rows: readonly StudyEntry[];
  readonly columns: readonly DesignColumn[];
  readonly refused: readonly { key: string; trait: TraitKey; level?: string; n: number; why: Refusal }[];
  /** Entries left out for want of a trait, or because too few share their level. */
  readonly leftOut: number;
}

/**
 * Columns of some traits over the entries that have all of them. A choice's reference is its absence (none, without), else its
 * most frequent level (of equals the first by name). A level with fewer than four entries is refused, and its entries left out; a measure
 * needs five entries and two values.
 */
export function designOf(keys: readonly TraitKey[], entries: readonly StudyEntry[]): Design {
  const reads = keys.map((key) => traitOf(key).of);
  const complete = entries.filter((entry) => reads.every((of) => of(entry) !== undefined));
  const rare = keys.flatMap((key) => (traitOf(key).kind === "choice" ? rareLevels(key, complete) : []));
  const rows =
    rare.length === 0
      ? complete
      : complete.filter((entry) => !rare.some(({ trait, level }) => traitOf(trait).of(entry) === level));
  const columns: DesignColumn[] = [];
  const refused: Design["refused"][number][] = rare.map((each) => ({
    ...each,
    key: `${each.trait}:${each.level}`,
    why: "too-few" as const,
  }));
  for (const trait of keys) {
    const values = rows.map((entry) => traitOf(trait).of(entry));
    const distinct = new Set(values);
    if (distinct.size < 2 || rows.length < MINIMUM.correlation)
      refused.push({ key: trait, trait, n: rows.length, why: distinct.size < 2 ? "one-value" : "too-few" });
    else if (traitOf(trait).kind === "measure")
      columns.push({
        key: trait,
        trait,
        step: traitOf(trait).step,
        values: numbersOf(values, Number),
        n: rows.length,
      });
    else columns.push(...choiceColumns(trait, values));
  }
  return { rows, columns, refused, leftOut: entries.length - rows.length };
}

function numbersOf(values: readonly unknown[], read: (value: unknown) => number): Float64Array {
  const numbers = new Float64Array(values.length);
  for (let i = 0; i < values.length; i++) numbers[i] = read(values[i]);
  return numbers;
}

function countsOf(values: Iterable<unknown>): [string, number][] {
  const counts = new Map<unknown, number>();
  for (const value of values) counts.set(value, (counts.get(value) ?? 0) + 1);
  return [...counts]
    .map(([value, n]): [string, number] => [String(value), n])
    .sort(([a, m], [b, n]) => n - m || (a < b ? -1 : 1));
}

function rareLevels(trait: TraitKey, entries: readonly StudyEntry[]) {
  return countsOf(entries.map((entry) => traitOf(trait).of(entry)))
    .filter(([, n]) => n < MINIMUM.perGroup)
    .map(([level, n]) => ({ trait, level, n }));
}

function choiceColumns(trait: TraitKey, values: readonly unknown[]): DesignColumn[] {
  const [first, ...others] = countsOf(values);
  const counted = first ? [first, ...others] : [];
  // What is added is said against its absence, however many have it.
  const reference = counted.find(([level]) => level === "without" || level === "none")?.[0] ?? first?.[0] ?? "";
  const levels = counted.filter(([level]) => level !== reference);
  return levels
    .sort(([a], [b]) => (a < b ? -1 : 1))
    .map(([level, n]) => ({
      key: `${trait}:${level}`,
      trait,
      level,
      reference,
      step: 1,
      values: numbersOf(values, (value) => (value === level ? 1 : 0)),
      n,
    }));
}
