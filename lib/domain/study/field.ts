import { median } from "@/lib/science/statistics/descriptive";
import { histogramOf } from "./distribution";
import { nearestDesigns } from "./nearest";
import { outcomes, shownValue, type OutcomeKey } from "./outcomes";
import { changeBetween, differingTraits } from "./pairs";
import { cellOf, type StudyEntry } from "./study-entry";
import { traitKeys, traitOf, type TraitKey, type TraitValue } from "./traits";

/** Fewest entries of a class that a best quarter is taken of, so that it holds five (house rule, no source). */
export const CLASS_MIN = 20;
const NEIGHBOURS = 8;

export interface OwnPlace {
  readonly entryId: string;
  readonly seasonNumber: number;
  readonly value: number | undefined;
  /** Of the class, how many are better (lower), and how many were reached at all; undefined against another baseline. */
  readonly better?: number;
  readonly of?: number;
}

export interface BestTrait {
  readonly trait: TraitKey;
  /** Of a measure its middle, of a choice its most frequent level with its share, among those that have the trait. */
  readonly best: string | number;
  readonly rest: string | number;
  readonly bestShare?: number;
  readonly restShare?: number;
  readonly nBest: number;
  readonly nRest: number;
  readonly own: string | number | null;
}

export interface RevisionChange {
  readonly fromEntryId: string;
  readonly toEntryId: string;
  readonly traits: readonly { trait: TraitKey; from: string | number | null; to: string | number | null }[];
  readonly change?: number;
  readonly expanded?: number;
  readonly together?: "round" | "cell" | "no";
}

const plain = (value: TraitValue) => value ?? null;

/** The design's entries among those of its class: one baseline unit, since others stand on another scale. */
export function fieldOf(own: readonly StudyEntry[], field: readonly StudyEntry[], outcome: OutcomeKey) {
  const latest = own.at(-1);
  if (!latest) return undefined;
  const oneScale = field.filter((entry) => entry.baselineUnitId === latest.baselineUnitId);
  const values = oneScale.flatMap((entry) => shownValue(outcome, entry) ?? []);
  return {
    entries: field.length,
    oneScale: oneScale.length,
    bins: histogramOf(values),
    own: own.map((entry): OwnPlace => {
      const value = shownValue(outcome, entry);
      const base = { entryId: entry.entryId, seasonNumber: entry.seasonNumber, value };
      if (value === undefined || entry.baselineUnitId !== latest.baselineUnitId) return base;
      return { ...base, better: values.filter((other) => other < value).length, of: values.length };
    }),
    neighbours: nearestDesigns(latest, field, NEIGHBOURS).map(({ entry, distance, traits }) => ({
      entryId: entry.entryId,
      distance,
      traits,
      differing: differingTraits(latest, entry),
      value: shownValue(outcome, entry),
      sameScale: entry.baselineUnitId === latest.baselineUnitId,
    })),
    best: bestOf(oneScale, latest, outcome),
    revisions: own.slice(1).flatMap((to, i): RevisionChange[] => {
      const from = own[i];
      return from ? [changeOf(from, to, outcome)] : [];
    }),
  };
}
export type Field = NonNullable<ReturnType<typeof fieldOf>>;

function changeOf(from: StudyEntry, to: StudyEntry, outcome: OutcomeKey): RevisionChange {
  const { fromEntryId, toEntryId } = { fromEntryId: from.entryId, toEntryId: to.entryId };
  const traits = differingTraits(from, to).map((trait) => ({
    trait,
    from: plain(traitOf(trait).of(from)),
    to: plain(traitOf(trait).of(to)),
  }));
  const change = from.baselineUnitId === to.baselineUnitId ? changeBetween(from, to, outcome) : undefined;
  return { fromEntryId, toEntryId, traits, ...change };
}

/**
 * What the best quarter of a class has against the rest of it, trait by trait. One entry a design, its best, so that a
 * design sent in often doesn't count often. It describes who did well; it is no effect of a trait.
 */
function bestOf(oneScale: readonly StudyEntry[], own: StudyEntry, outcome: OutcomeKey) {
  const of = (entry: StudyEntry) => outcomes[outcome].of(entry)?.value;
  const best = new Map<string, { entry: StudyEntry; value: number }>();
  for (const entry of oneScale) {
    const value = of(entry);
    if (value !== undefined && value < (best.get(entry.designId)?.value ?? Infinity))
      best.set(entry.designId, { entry, value });
  }
  const ranked = [...best.values()].sort((a, b) => a.value - b.value || (cellOf(a.entry) < cellOf(b.entry) ? -1 : 1));
  if (ranked.length < CLASS_MIN) return { designs: ranked.length, traits: [] };
  const cut = Math.floor(ranked.length / 4);
  const [top, rest] = [ranked.slice(0, cut), ranked.slice(cut)].map((list) => list.map(({ entry }) => entry));
  return {
    designs: ranked.length,
    traits: traitKeys.flatMap((trait) => comparedTrait(trait, top ?? [], rest ?? [], own)),
  };
}

/** Fewest of each side that have the trait (as many as a best quarter of the smallest class). */
const SIDE_MIN = CLASS_MIN / 4;

function comparedTrait(
  trait: TraitKey,
  top: readonly StudyEntry[],
  rest: readonly StudyEntry[],
  own: StudyEntry,
): BestTrait[] {
  const read = (list: readonly StudyEntry[]) => list.flatMap((entry) => traitOf(trait).of(entry) ?? []);
  const [a, b] = [read(top), read(rest)];
  if (a.length < SIDE_MIN || b.length < SIDE_MIN || new Set([...a, ...b]).size < 2) return [];
  const base = { trait, nBest: a.length, nRest: b.length, own: plain(traitOf(trait).of(own)) };
  if (traitOf(trait).kind === "measure")
    return [{ ...base, best: median(a.map(Number)) ?? Number.NaN, rest: median(b.map(Number)) ?? Number.NaN }];
  const level = mostFrequent(a);
  const share = (list: readonly unknown[]) => list.filter((each) => each === level).length / list.length;
  return [{ ...base, best: level, rest: level, bestShare: share(a), restShare: share(b) }];
}

function mostFrequent(list: readonly (string | number)[]): string | number {
  const counts = new Map<string | number, number>();
  for (const each of list) counts.set(each, (counts.get(each) ?? 0) + 1);
  return [...counts].sort(([x, m], [y, n]) => n - m || (String(x) < String(y) ? -1 : 1))[0]?.[0] ?? "";
}
