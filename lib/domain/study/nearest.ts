import type { StudyEntry } from "./study-entry";
import { traitKeys, traitOf, type TraitKey } from "./traits";

/** What follows from other traits says nothing new, and counts in no distance. */
const counted = traitKeys.filter((key) => !traitOf(key).follows);

/** Largest less smallest of each measure over some entries: what its differences are divided by. */
export function rangesOf(entries: readonly StudyEntry[]): Map<TraitKey, number> {
  return new Map(
    counted
      .filter((key) => traitOf(key).kind === "measure")
      .map((key) => {
        let [low, high] = [Infinity, -Infinity];
        for (const entry of entries) {
          const value = traitOf(key).of(entry);
          if (typeof value !== "number") continue;
          low = Math.min(low, value);
          high = Math.max(high, value);
        }
        return [key, high > low ? high - low : 0];
      }),
  );
}

export interface TraitDistance {
  /** 0: alike in every trait that both have; 1: as far apart as the field goes in every one. */
  readonly distance: number;
  /** How many traits it rests on. */
  readonly traits: number;
}

/**
 * Distance of two models by J. C. Gower's coefficient (Biometrics 27 (1971) 857): the mean over traits that both have of
 * |a − b| over the field's range for a measure (at most 1), and of 0 or 1 for a choice. A trait that one of them lacks
 * counts for nothing; a measure that doesn't vary in the field neither. Undefined where nothing can be compared.
 */
export function gowerDistance(
  a: StudyEntry,
  b: StudyEntry,
  ranges: ReadonlyMap<TraitKey, number>,
): TraitDistance | undefined {
  let [total, traits] = [0, 0];
  for (const key of counted) {
    const [x, y] = [traitOf(key).of(a), traitOf(key).of(b)];
    if (x === undefined || y === undefined) continue;
    if (typeof x === "number" && typeof y === "number") {
      const range = ranges.get(key) ?? 0;
      if (range === 0) continue;
      total += Math.min(1, Math.abs(x - y) / range);
    } else total += x === y ? 0 : 1;
    traits++;
  }
  return traits === 0 ? undefined : { distance: total / traits, traits };
}

export type Neighbour = TraitDistance & { readonly entry: StudyEntry };

/** The nearest other designs, a design once by its nearest entry; of equals the first by id. */
export function nearestDesigns(own: StudyEntry, field: readonly StudyEntry[], most: number): Neighbour[] {
  const ranges = rangesOf(field);
  const nearest = new Map<string, Neighbour>();
  for (const entry of field) {
    if (entry.designId === own.designId) continue;
    const found = gowerDistance(own, entry, ranges);
    if (!found) continue;
    const known = nearest.get(entry.designId);
    if (!known || found.distance < known.distance) nearest.set(entry.designId, { ...found, entry });
  }
  return [...nearest.values()]
    .sort((a, b) => a.distance - b.distance || (a.entry.entryId < b.entry.entryId ? -1 : 1))
    .slice(0, most);
}
