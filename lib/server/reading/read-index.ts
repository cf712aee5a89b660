import { publicDb } from "@/db/client/handles";
import { shownDistances } from "@/db/queries/shown/benches";
import { shownSeasons } from "@/db/queries/shown/seasons";
import { shownEntriesByIds, shownRevisions } from "@/db/queries/shown/sheet";
import type { DrawnTraitsAnswer } from "@/lib/contracts/compare";
import type { IndexQuery } from "@/lib/contracts/index-query";
import { groupBy } from "@/lib/domain/group-by";
import { drawnTraits } from "./drawn-traits";
import { findEntries } from "./find-entries";
import { findDesigns } from "./find-designs";

/** What the entries' front views are drawn from, by entry id. */
async function drawingsOf(entryIds: readonly string[]): Promise<Record<string, DrawnTraitsAnswer>> {
  const entries = await shownEntriesByIds(publicDb(), { entryIds });
  const { traits, rotors } = await shownRevisions(publicDb(), {
    revisionIds: [...new Set(entries.map(({ revisionId }) => revisionId))],
  });
  const rotorsOf = groupBy(rotors, (rotor) => rotor.revision_id);
  const traitOf = new Map(traits.map((trait) => [trait.revision_id, trait]));
  return Object.fromEntries(
    entries.flatMap(({ entryId, revisionId }) => {
      const trait = traitOf.get(revisionId);
      return trait ? [[entryId, drawnTraits(trait, rotorsOf.get(revisionId) ?? [])]] : [];
    }),
  );
}

/**
 * The index page: the answer to its question, with what heads and labels need beside it.
 *
 * @param clips what the address brings as picked, to be called by name
 */
export async function readIndex({ query, clips }: { query: IndexQuery; clips: readonly string[] }) {
  const [answer, seasons, clipped] = await Promise.all([
    findDesigns(query),
    shownSeasons(publicDb()),
    findEntries({ named: clips }),
  ]);
  const bench = answer.comparableOnly ? answer.items[0]?.comparable.split(" ")[0] : undefined;
  const distances = bench ? await shownDistances(publicDb(), { benchVersionIds: [bench] }) : new Map<string, number>();
  return {
    answer,
    drawings: query.view === "drawings" ? await drawingsOf(answer.items.map((item) => item.entryId)) : {},
    seasonTitles: Object.fromEntries(seasons.map((season) => [season.slug, season.title])),
    distanceMm: bench ? distances.get(bench) : undefined,
    clipNames: Object.fromEntries(clipped.entries.map((entry) => [entry.token, `${entry.name} ${entry.letter}`])),
  };
}
