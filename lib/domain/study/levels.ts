import { quantile } from "@/lib/science/statistics/descriptive";
import type { StudyEntry } from "./study-entry";
import { traitOf, type TraitKey } from "./traits";

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
  return [...groups]
    .sort(([a], [b]) => (typeof a === "number" && typeof b === "number" ? a - b : String(a) < String(b) ? -1 : 1))
    .map(([value, list]) => ({
      key: String(value),
      ...(typeof value === "number" ? { from: value, to: value } : {}),
      entries: list,
    }));
}

function bands(key: TraitKey, entries: readonly StudyEntry[]): Level[] {
  const read = (entry: StudyEntry) => Number(traitOf(key).of(entry));
  const values = Float64Array.from(entries, read);
  const cuts = [0, 0.25, 0.5, 0.75, 1].map((p) => quantile(values, p) ?? Number.NaN);
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
    return {
      key: `${from}-${to}`,
      from,
      to,
      entries: entries.filter((entry) => read(entry) >= from && (last ? read(entry) <= next : read(entry) < next)),
    };
  });
}
