import { publicDb } from "@/db/client/handles";
import { shownSeasonBaselines, shownSeasonBenches, shownSeasonFrames } from "@/db/queries/shown/season-parts";
import { shownRounds, shownSeasons, type RoundRow, type SeasonRow } from "@/db/queries/shown/seasons";
import { shownProtocol } from "@/db/queries/shown/sheet-parts";
import type { Round, Season, SeasonLine } from "@/lib/contracts/seasons";
import { ExpectedError } from "@/lib/domain/expected-error";
import type { RuleKind } from "@/lib/domain/scoring/rules";
import { readStanding } from "./read-standing";

const iso = (at: Date): string => at.toISOString();
const isoOrNull = (at: Date | null): string | null => (at ? iso(at) : null);

function seasonLine(season: SeasonRow, rounds: readonly RoundRow[]): SeasonLine {
  return {
    slug: season.slug,
    number: season.number,
    title: season.title,
    summary: season.summary,
    opensAt: isoOrNull(season.opensAt),
    closesAt: isoOrNull(season.closesAt),
    closedAt: isoOrNull(season.closedAt),
    entries: season.entries,
    levelsDba: season.levelsDba,
    headlineDba: season.headlineDba,
    microphoneDistanceMm: season.microphoneDistanceMm,
    rounds: rounds
      .filter((round) => round.seasonId === season.id)
      .map(({ number, title, publishedAt }) => ({ number, title, publishedAt: iso(publishedAt) }))
      .sort((a, b) => a.number - b.number),
  };
}

/** Every season that has opened, the newest first, with its published rounds. */
export async function readSeasons(): Promise<{ items: SeasonLine[] }> {
  const db = publicDb();
  const [seasons, rounds] = await Promise.all([shownSeasons(db), shownRounds(db)]);
  return { items: seasons.map((season) => seasonLine(season, rounds)) };
}

/** Every published round, the newest first. */
export async function readRounds() {
  const { items } = await readSeasons();
  return {
    items: items
      .flatMap((season) => season.rounds.map((round) => ({ ...round, season: season.slug, seasonTitle: season.title })))
      .sort((a, b) => (a.publishedAt < b.publishedAt ? 1 : -1)),
  };
}

async function oneSeason(slug: string): Promise<SeasonRow> {
  const [season] = await shownSeasons(publicDb(), { slug });
  if (!season) throw new ExpectedError("not_found", "There is no open season at this address.");
  return season;
}

/**
 * A season with its rules, bench, protocol and standing under its own rule or another one.
 * @throws ExpectedError not_found where no such season has opened, or the rule has no standing
 */
export async function readSeason({ slug, rule }: { slug: string; rule?: RuleKind }): Promise<Season> {
  const db = publicDb();
  const season = await oneSeason(slug);
  const of = { seasonId: season.id };
  const [rounds, benches, baselines, frames, protocol, standing] = await Promise.all([
    shownRounds(db, of),
    shownSeasonBenches(db, of),
    shownSeasonBaselines(db, of),
    shownSeasonFrames(db, of),
    shownProtocol(db, { protocolVersionId: season.protocolVersionId }),
    readStanding({ ...of, roundId: null, seasonRuleVersionId: season.ruleVersionId, rule }),
  ]);
  if (!protocol) throw new Error(`the season ${season.slug} is open without a protocol`);
  return {
    ...seasonLine(season, rounds),
    rules: season.rules,
    totalDepthMaxMm: season.totalDepthMaxMm,
    inletStackMaxMm: season.inletStackMaxMm,
    frames,
    benches: benches.map((bench) => ({ ...bench, from: iso(bench.from) })),
    baselines: baselines.map((baseline) => ({ ...baseline, from: iso(baseline.from) })),
    protocol,
    standing,
  };
}

/** A published round with its standing. @throws ExpectedError not_found before its publication as after a mistake */
export async function readRound({
  slug,
  number,
  rule,
}: {
  slug: string;
  number: number;
  rule?: RuleKind;
}): Promise<Round> {
  const db = publicDb();
  const season = await oneSeason(slug);
  const rounds = (await shownRounds(db, { seasonId: season.id })).sort((a, b) => a.number - b.number);
  const round = rounds.find((each) => each.number === number);
  if (!round) throw new ExpectedError("not_found", "There is no published round at this address.");
  const standing = await readStanding({
    seasonId: season.id,
    roundId: round.id,
    seasonRuleVersionId: season.ruleVersionId,
    rule,
  });
  return {
    season: { slug: season.slug, title: season.title, number: season.number },
    number: round.number,
    title: round.title,
    publishedAt: iso(round.publishedAt),
    headlineDba: season.headlineDba,
    levelsDba: season.levelsDba,
    microphoneDistanceMm: season.microphoneDistanceMm,
    before: rounds.findLast((each) => each.number < number)?.number ?? null,
    after: rounds.find((each) => each.number > number)?.number ?? null,
    standing,
  };
}
