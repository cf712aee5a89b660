import { quantile } from "@/lib/science/statistics/descriptive";
import { MINIMUM } from "@/lib/science/statistics/minimum-counts";
import { medianInterval } from "@/lib/science/statistics/rank-tests";
import { levelsOf } from "./levels";
import { outcomeKeys, shownValue, type OutcomeKey } from "./outcomes";
import type { StudyEntry } from "./study-entry";
import type { TraitKey } from "./traits";

/** How an outcome is spread over some entries, in the outcome's unit. */
export interface Spread {
  readonly n: number;
  readonly median?: number;
  /** 95 % interval of the median by order statistics; from six values on. */
  readonly low?: number;
  readonly high?: number;
  readonly quartileLow?: number;
  readonly quartileHigh?: number;
  /** Every value by itself, where there are too few for a median. */
  readonly values?: readonly number[];
}

export interface LevelSpread {
  readonly key: string;
  readonly from?: number;
  readonly to?: number;
  readonly spreads: Readonly<Record<OutcomeKey, Spread>>;
  /** Counts in the trait's common bins of the outcome asked for; none where there are too few. */
  readonly counts?: readonly number[];
}

export interface Distribution {
  readonly trait: TraitKey;
  /** Lower edges and width of the bins that the levels share. */
  readonly bins: { readonly from: number; readonly width: number; readonly count: number };
  readonly levels: readonly LevelSpread[];
  /** Entries without the trait. */
  readonly without: number;
}

/** Spread of some values; a median from four on, its interval from six on (a wider count would be a guess). */
export function spreadOf(values: readonly number[]): Spread {
  const n = values.length;
  if (n < MINIMUM.perGroup) return { n, values: [...values].sort((a, b) => a - b) };
  const found = medianInterval(values);
  return {
    n,
    median: found?.median,
    low: found?.interval?.low,
    high: found?.interval?.high,
    quartileLow: quantile(values, 0.25),
    quartileHigh: quantile(values, 0.75),
  };
}

const valuesOf = (outcome: OutcomeKey, entries: readonly StudyEntry[]) =>
  entries.map((entry) => shownValue(outcome, entry)).filter((value) => value !== undefined);

/** Outcomes over the levels of one trait. The entries must stand on one scale: one baseline unit. */
export function distributionOf(trait: TraitKey, outcome: OutcomeKey, entries: readonly StudyEntry[]): Distribution {
  const levels = levelsOf(trait, entries);
  const bins = binsFor(valuesOf(outcome, entries));
  return {
    trait,
    bins,
    without: entries.length - levels.reduce((total, level) => total + level.entries.length, 0),
    levels: levels.map(({ key, from, to, entries: of }) => {
      const spreads = Object.fromEntries(outcomeKeys.map((each) => [each, spreadOf(valuesOf(each, of))]));
      const values = valuesOf(outcome, of);
      return {
        key,
        ...(from === undefined ? {} : { from, to }),
        spreads: spreads as Record<OutcomeKey, Spread>,
        ...(values.length < MINIMUM.perGroup ? {} : { counts: countIn(bins, values) }),
      };
    }),
  };
}

/** At most about twenty bins of a round width (1, 2 or 5 times a power of ten) that hold all values. */
function binsFor(values: readonly number[]): Distribution["bins"] {
  if (values.length === 0) return { from: 0, width: 1, count: 0 };
  const [low, high] = [Math.min(...extremes(values)), Math.max(...extremes(values))];
  const wanted = Math.max((high - low) / 20, 1e-3);
  const power = 10 ** Math.floor(Math.log10(wanted));
  const width = power * ([1, 2, 5, 10].find((factor) => factor * power >= wanted) ?? 10);
  const first = Math.floor(low / width);
  return { from: round(first * width), width: round(width), count: Math.floor(high / width + 1e-9) - first + 1 };
}

/** The two ends of a list of any length, which Math.min(...) can't take. */
function extremes(values: readonly number[]): [number, number] {
  return values.reduce(([low, high], value) => [Math.min(low, value), Math.max(high, value)] as [number, number], [
    Infinity,
    -Infinity,
  ] as [number, number]);
}

const round = (value: number) => Number(value.toFixed(9));

function countIn({ from, width, count }: Distribution["bins"], values: readonly number[]): number[] {
  const counts = Array.from({ length: count }, () => 0);
  for (const value of values) {
    const bin = Math.min(count - 1, Math.max(0, Math.floor((value - from) / width + 1e-9)));
    counts[bin] = (counts[bin] ?? 0) + 1;
  }
  return counts;
}
