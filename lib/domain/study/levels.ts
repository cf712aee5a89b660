import { ascending, sortedQuantile } from "@/lib/science/statistics/descriptive";
import type { StudyEntry } from "./study-entry";
import { traitOf, type TraitKey, type TraitValue } from "./traits";

/** One group of entries by a trait: a name, a whole number, or a band from ≤ value < to (the last band ≤ to). */
export interface Level {
  readonly key: string;
  readonly from?: number;
  readonly to?: number;
  readonly entries: readonly StudyEntry[];
}

/** A measure with more different values than this is put into four bands of about as many entries. */
const VALUES_MAX = 8;

/**
 * Entries by the levels of a trait, in order: a choice by its names, a measure by its values, or by quartile bands when
 * there are many. Entries without the trait are left out; no entries give no levels.
 */
export function levelsOf(key: TraitKey, entries: readonly StudyEntry[]): Level[] {
  const trait = traitOf(key);
  const groups = new Map<string | number, StudyEntry[]>();
  for (const entry of entries) {
    const value = trait.of(entry);
    if (value === undefined) continue;
    const group = groups.get(value);
    if (group) group.push(entry);
    else groups.set(value, [entry]);
  }
  if (trait.kind === "measure" && groups.size > VALUES_MAX) return bands(key, [...groups.values()].flat());
  return [...groups].sort(([a], [b]) => inOrder(a, b)).map(([value, list]) => ({ ...nameOf(value), entries: list }));
}

/** The level of every entry, as an index into `levels`; −1 without the trait. The levels are those of `levelsOf`. */
export interface Placed {
  readonly levels: readonly Omit<Level, "entries">[];
  readonly level: Int32Array;
}

/** Which level each entry has, without lists of entries: what many traits over many entries take. */
export function placesOf(key: TraitKey, entries: readonly StudyEntry[]): Placed {
  const trait = traitOf(key);
  const values = entries.map((entry) => trait.of(entry));
  const distinct = new Set(values);
  distinct.delete(undefined);
  if (trait.kind === "measure" && distinct.size > VALUES_MAX) return placedInBands(key, values);
  const ordered = [...distinct].flatMap((value) => (value === undefined ? [] : [value])).sort(inOrder);
  const places = new Map<TraitValue, number>(ordered.map((value, i) => [value, i]));
  return { levels: ordered.map(nameOf), level: numbersOf(values, (value) => places.get(value) ?? -1) };
}

function placedInBands(key: TraitKey, values: readonly TraitValue[]): Placed {
  const known = values.flatMap((value) => (value === undefined ? [] : [Number(value)]));
  const bands = bandsOf(key, ascending(known));
  const find = (value: TraitValue) => (value === undefined ? -1 : bands.findIndex(({ has }) => has(Number(value))));
  return { levels: bands.map(({ has: _has, ...band }) => band), level: numbersOf(values, find) };
}

function numbersOf(values: readonly TraitValue[], read: (value: TraitValue) => number): Int32Array {
  const numbers = new Int32Array(values.length);
  for (let i = 0; i < values.length; i++) numbers[i] = read(values[i]);
  return numbers;
}

const inOrder = (a: string | number, b: string | number): number =>
  typeof a === "number" && typeof b === "number" ? a - b : String(a) < String(b) ? -1 : 1;
const nameOf = (value: string | number) => ({
  key: String(value),
  ...(typeof value === "number" ? { from: value, to: value } : {}),
});

type Band = { key: string; from: number; to: number; has: (value: number) => boolean };

/** Four bands of about as many entries; `values` ascending. */
function bandsOf(key: TraitKey, values: Float64Array): Band[] {
  const cuts = [0, 0.25, 0.5, 0.75, 1].map((p) => sortedQuantile(values, p) ?? Number.NaN);
  // Whole numbers get whole bands; else a tenth of the trait's step, so that a band's ends can be read aloud.
  const whole = values.every((value) => Number.isInteger(value));
  const unit = whole ? 1 : traitOf(key).step / 10;
  const rounded = cuts.map((cut, i) => (i === 4 ? Math.ceil(cut / unit) : Math.floor(cut / unit)) * unit);
  const edges = [...new Set(rounded.map((edge) => Number(edge.toFixed(6))))];
  return edges.slice(1).map((next, i) => {
    const from = edges[i] ?? next;
    const last = i === edges.length - 2;
    // Of whole numbers the band ends before the next one begins: 3–6, 7–8.
    const to = whole && !last ? next - 1 : next;
    return { key: `${from}-${to}`, from, to, has: (value) => value >= from && (last ? value <= next : value < next) };
  });
}

function bands(key: TraitKey, entries: readonly StudyEntry[]): Level[] {
  const read = (entry: StudyEntry) => Number(traitOf(key).of(entry));
  return bandsOf(key, ascending(entries.map(read))).map(({ has, ...band }) => ({
    ...band,
    entries: entries.filter((entry) => has(read(entry))),
  }));
}
