import { ascending, at, sortedQuantile } from "@/lib/science/statistics/descriptive";
import { MINIMUM } from "@/lib/science/statistics/minimum-counts";
import { sortedMedianInterval } from "@/lib/science/statistics/rank-tests";
import { placesOf } from "./levels";
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
  return spreadOfSorted(ascending(values));
}

function spreadOfSorted(sorted: Float64Array): Spread {
  const n = sorted.length;
  if (n < MINIMUM.perGroup) return { n, values: [...sorted] };
  const found = sortedMedianInterval(sorted);
  return {
    n,
    median: found?.median,
    low: found?.interval?.low,
    high: found?.interval?.high,
    quartileLow: sortedQuantile(sorted, 0.25),
    quartileHigh: sortedQuantile(sorted, 0.75),
  };
}

/** What entries reached of one outcome, as it is shown, in ascending order; and which entry each is of. */
interface Reached {
  readonly values: Float64Array;
  readonly places: Uint32Array;
}

function reachedIn(outcome: OutcomeKey, entries: readonly StudyEntry[]): Reached {
  const all = Float64Array.from(entries, (entry) => shownValue(outcome, entry) ?? Number.NaN);
  const places = new Uint32Array(entries.length).map((_, i) => i).filter((i) => !Number.isNaN(at(all, i)));
  places.sort((a, b) => at(all, a) - at(all, b));
  return { values: Float64Array.from(places, (i) => at(all, i)), places };
}

/** The values of each level, still in order. */
function splitByLevel({ values, places }: Reached, level: Int32Array, levels: number): Float64Array[] {
  const counts = new Uint32Array(levels);
  for (const i of places) if (at(level, i) >= 0) counts[at(level, i)] = at(counts, at(level, i)) + 1;
  const split = Array.from(counts, (count) => new Float64Array(count));
  counts.fill(0);
  for (let k = 0; k < places.length; k++) {
    const own = at(level, at(places, k));
    const list = split[own];
    if (!list) continue;
    list[at(counts, own)] = at(values, k);
    counts[own] = at(counts, own) + 1;
  }
  return split;
}

/** Outcomes over the levels of one trait. The entries must stand on one scale: one baseline unit. */
export function distributionOf(trait: TraitKey, outcome: OutcomeKey, entries: readonly StudyEntry[]): Distribution {
  const [only] = distributionsOf([trait], outcome, entries);
  if (!only) throw new Error("one trait has one distribution");
  return only;
}

/** The same of several traits: each outcome is put in order once. */
export function distributionsOf(
  keys: readonly TraitKey[],
  outcome: OutcomeKey,
  entries: readonly StudyEntry[],
): Distribution[] {
  const reached = outcomeKeys.map((key) => [key, reachedIn(key, entries)] as const);
  const bins = binsFor(reached.find(([key]) => key === outcome)?.[1].values ?? new Float64Array(0));
  return keys.map((trait) => {
    const { levels, level } = placesOf(trait, entries);
    const split = reached.map(([key, of]) => [key, splitByLevel(of, level, levels.length)] as const);
    const asked = split.find(([key]) => key === outcome)?.[1] ?? [];
    return {
      trait,
      bins,
      without: level.reduce((total, place) => (place < 0 ? total + 1 : total), 0),
      levels: levels.map((each, i) => {
        const none = new Float64Array(0);
        const spreads = Object.fromEntries(split.map(([key, lists]) => [key, spreadOfSorted(lists[i] ?? none)]));
        const values = asked[i] ?? none;
        return {
          ...each,
          spreads: spreads as Record<OutcomeKey, Spread>,
          ...(values.length < MINIMUM.perGroup ? {} : { counts: countIn(bins, values) }),
        };
      }),
    };
  });
}

/** How values are spread, in round bins of one width. */
export function histogramOf(values: readonly number[]): { from: number; width: number; counts: number[] } {
  const sorted = ascending(values);
  const bins = binsFor(sorted);
  return { from: bins.from, width: bins.width, counts: countIn(bins, sorted) };
}

/** At most about twenty bins of a round width (1, 2 or 5 times a power of ten) that hold all values. */
function binsFor(values: Float64Array): Distribution["bins"] {
  if (values.length === 0) return { from: 0, width: 1, count: 0 };
  const [low, high] = [at(values, 0), at(values, values.length - 1)];
  const wanted = Math.max((high - low) / 20, 1e-3);
  const power = 10 ** Math.floor(Math.log10(wanted));
  const width = power * ([1, 2, 5, 10].find((factor) => factor * power >= wanted) ?? 10);
  const first = Math.floor(low / width);
  return { from: round(first * width), width: round(width), count: Math.floor(high / width + 1e-9) - first + 1 };
}

const round = (value: number) => Number(value.toFixed(9));

function countIn({ from, width, count }: Distribution["bins"], values: Float64Array): number[] {
  const counts = Array.from({ length: count }, () => 0);
  for (const value of values) {
    const bin = Math.min(count - 1, Math.max(0, Math.floor((value - from) / width + 1e-9)));
    counts[bin] = (counts[bin] ?? 0) + 1;
  }
  return counts;
}
