import { publicDb } from "@/db/client/handles";
import { shownDistances } from "@/db/queries/shown/benches";
import { entriesByIds } from "@/db/queries/shown/entries";
import { latestCorrections, shownCounts } from "@/db/queries/shown/home";
import { shownRounds, shownSeasons, shownStandingRows, shownStandings } from "@/db/queries/shown/seasons";
import { indexItem } from "./list-designs";

const topRows = 5;
const correctionsShown = 3;

/** What the first page shows: the latest published round with its top entries, counts, latest corrections. */
export async function readHome() {
  const db = publicDb();
  const [counts, corrections, latest] = await Promise.all([
    shownCounts(db),
    latestCorrections(db, { limit: correctionsShown }),
    latestRound(),
  ]);
  return { counts, corrections, latest };
}
export type HomeAnswer = Awaited<ReturnType<typeof readHome>>;

/** The round published last, with the best of its standing under the season's own rule; undefined before the first. */
async function latestRound() {
  const db = publicDb();
  const [[round], seasons] = await Promise.all([shownRounds(db), shownSeasons(db)]);
  const season = seasons.find((each) => each.id === round?.seasonId);
  if (!round || !season) return undefined;
  const standings = await shownStandings(db, { seasonId: season.id, roundId: round.id });
  const own = standings.find((standing) => standing.ruleVersionId === season.ruleVersionId);
  const rows = own ? await shownStandingRows(db, { standingId: own.id }) : [];
  const best = rows.filter((row) => row.rank !== null && row.slug !== null).slice(0, topRows);
  const items = (await entriesByIds(db, { entryIds: best.map((row) => row.entryId) })).map(indexItem);
  const benchVersionId = items[0]?.comparable.split(" ")[0];
  const distances = await shownDistances(db, { benchVersionIds: benchVersionId ? [benchVersionId] : [] });
  return {
    seasonSlug: season.slug,
    seasonTitle: season.title,
    headlineDba: season.headlineDba,
    number: round.number,
    publishedAt: round.publishedAt,
    entries: rows.length,
    oneScale: new Set(items.map((item) => item.comparable)).size === 1,
    distanceMm: benchVersionId ? distances.get(benchVersionId) : undefined,
    items,
  };
}
export type LatestRound = NonNullable<Awaited<ReturnType<typeof latestRound>>>;
