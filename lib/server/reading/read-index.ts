import { publicDb } from "@/db/client/handles";
import { shownDistances } from "@/db/queries/shown/benches";
import { shownSeasons } from "@/db/queries/shown/seasons";
import type { IndexQuery } from "@/lib/contracts/index-query";
import { findEntries } from "./find-entries";
import { findDesigns } from "./find-designs";

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
    seasonTitles: Object.fromEntries(seasons.map((season) => [season.slug, season.title])),
    distanceMm: bench ? distances.get(bench) : undefined,
    clipNames: Object.fromEntries(clipped.entries.map((entry) => [entry.token, `${entry.name} ${entry.letter}`])),
  };
}
