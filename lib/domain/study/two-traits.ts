import { MINIMUM } from "@/lib/science/statistics/minimum-counts";
import { spreadOf, type Spread } from "./distribution";
import { fitEffects, type Effect, type EffectsFit } from "./effects";
import { levelsOf, type Level } from "./levels";
import { modelValue, shownValue, type OutcomeKey } from "./outcomes";
import type { StudyEntry } from "./study-entry";
import { traitOf, type TraitKey } from "./traits";

export type LevelName = Pick<Level, "key" | "from" | "to">;

export interface TwoTraits {
  readonly traits: readonly [TraitKey, TraitKey];
  readonly rows: readonly LevelName[];
  readonly columns: readonly LevelName[];
  /** Row by row: the outcome where both levels meet; no median under four entries. */
  readonly grid: readonly (readonly Spread[])[];
  /** The first trait's effects within each level of the second, each a fit of its own. */
  readonly within: readonly { readonly level: LevelName; readonly n: number; readonly effects: readonly Effect[] }[];
  /** A thinned scatter: the first trait, the outcome, the second's level; every `everyNth` entry in order of id. */
  readonly points: readonly { readonly x: number | string; readonly y: number; readonly level: string }[];
  readonly everyNth: number;
}

/** As many points as a small chart can show. */
const POINTS_MAX = 400;

/**
 * Two traits against each other: medians where their levels meet, the effect of the first within each level of the
 * second (cells and clusters as in the whole), and a scatter. Medians and scatter take entries of one baseline unit,
 * `oneScale`; effects take all, since each cell keeps a level of its own.
 */
export function twoTraits(
  [first, second]: readonly [TraitKey, TraitKey],
  outcome: OutcomeKey,
  { entries, oneScale }: { entries: readonly StudyEntry[]; oneScale: readonly StudyEntry[] },
  seed: number,
): TwoTraits {
  const reached = oneScale.filter((entry) => modelValue(outcome, entry) !== undefined);
  const [rows, columns] = [levelsOf(first, reached), levelsOf(second, reached)];
  const placed = columns.flatMap((level) => level.entries.map((entry) => [entry.entryId, level.key] as const));
  const levelById = new Map(placed);
  const points = reached
    .filter((entry) => levelById.has(entry.entryId) && traitOf(first).of(entry) !== undefined)
    .sort((a, b) => (a.entryId < b.entryId ? -1 : 1));
  const everyNth = Math.max(1, Math.ceil(points.length / POINTS_MAX));
  return {
    traits: [first, second],
    rows: rows.map(nameOf),
    columns: columns.map(nameOf),
    grid: rows.map((row) => {
      const own = new Set(row.entries);
      return columns.map((column) =>
        spreadOf(column.entries.flatMap((entry) => (own.has(entry) ? (shownValue(outcome, entry) ?? []) : []))),
      );
    }),
    within: levelsOf(second, entries).map((level) => ({
      level: nameOf(level),
      ...effectsWithin(first, outcome, level, seed),
    })),
    points: points
      .filter((_, i) => i % everyNth === 0)
      .map((entry) => ({
        x: traitOf(first).of(entry) ?? "",
        y: shownValue(outcome, entry) ?? Number.NaN,
        level: levelById.get(entry.entryId) ?? "",
      })),
    everyNth,
  };
}

function effectsWithin(trait: TraitKey, outcome: OutcomeKey, { entries }: Level, seed: number) {
  const { n, effects }: EffectsFit = fitEffects([trait], outcome, entries, seed);
  if (n >= MINIMUM.correlation) return { n, effects };
  return { n, effects: [{ key: trait, trait, n, why: "too-few" as const }] };
}

const nameOf = ({ key, from, to }: Level): LevelName => ({ key, ...(from === undefined ? {} : { from, to }) });
