import type { RuleKind } from "@/lib/domain/scoring/rules";
import type { Handle } from "../../client/connect";

export interface SeasonRow {
  id: string;
  number: number;
  slug: string;
  title: string;
  summary: string;
  rules: string;
  protocolVersionId: string;
  ruleVersionId: string;
  levelsDba: number[];
  headlineDba: number;
  totalDepthMaxMm: number | null;
  inletStackMaxMm: number | null;
  opensAt: Date | null;
  closesAt: Date | null;
  closedAt: Date | null;
  /** Null where bench versions of different distances count. */
  microphoneDistanceMm: number | null;
  entries: number;
  rounds: number;
}

const seasonColumns = {
  id: "s.id",
  number: "s.number",
  slug: "s.slug",
  title: "s.title",
  summary: "s.summary",
  rules: "s.rules",
  protocolVersionId: "s.protocol_version_id",
  ruleVersionId: "s.scoring_rule_version_id",
  levelsDba: "s.levels_dba",
  headlineDba: "s.headline_dba",
  totalDepthMaxMm: "s.total_depth_max_mm",
  inletStackMaxMm: "s.inlet_stack_max_mm",
  opensAt: "s.opens_at",
  closesAt: "s.closes_at",
  closedAt: "s.closed_at",
};

/** Seasons that have opened, the newest first, or the one with this address. */
export async function shownSeasons(db: Handle, { slug }: { slug?: string } = {}): Promise<SeasonRow[]> {
  return db("shown.season as s")
    .leftJoin("shown.season_count as c", "c.season_id", "s.id")
    .modify((query) => void (slug !== undefined && query.where("s.slug", slug)))
    .orderBy("s.number", "desc")
    .select(
      seasonColumns,
      db.raw(
        `(select case when count(distinct v.microphone_distance_mm) = 1 then min(v.microphone_distance_mm) end
          from shown.season_bench sb join shown.bench_version v on v.id = sb.bench_version_id
          where sb.season_id = s.id) as "microphoneDistanceMm"`,
      ),
      db.raw("coalesce(c.entries, 0) as entries"),
      db.raw("(select count(*)::int from shown.round r where r.season_id = s.id) as rounds"),
    );
}

export interface RoundRow {
  id: string;
  seasonId: string;
  number: number;
  title: string;
  publishedAt: Date;
}

export async function shownRounds(db: Handle, { seasonId }: { seasonId?: string } = {}): Promise<RoundRow[]> {
  return db("shown.round")
    .modify((query) => void (seasonId !== undefined && query.where({ season_id: seasonId })))
    .orderBy("published_at", "desc")
    .select({ id: "id", seasonId: "season_id", number: "number", title: "title", publishedAt: "published_at" });
}

export interface ShownStanding {
  id: string;
  number: number;
  ruleVersionId: string;
  ruleKind: RuleKind;
  ruleName: string;
  asOf: Date;
  draws: number;
  seed: number;
}

/** The newest standing of each rule for a season (roundId null) or a round; with `number` that one of the rule. */
export async function shownStandings(
  db: Handle,
  { seasonId, roundId }: { seasonId: string; roundId: string | null },
): Promise<ShownStanding[]> {
  const { rows }: { rows: ShownStanding[] } = await db.raw(
    `select distinct on (t.rule_version_id) t.id, t.number, t.rule_version_id as "ruleVersionId", v.kind as "ruleKind",
       v.rule_name as "ruleName", t.as_of as "asOf", t.draws, t.seed
     from shown.standing t join shown.scoring_rule_version v on v.id = t.rule_version_id
     where t.season_id = :seasonId and t.round_id is not distinct from :roundId
     order by t.rule_version_id, t.number desc`,
    { seasonId, roundId },
  );
  return rows;
}

export interface ShownStandingRow {
  entryId: string;
  slug: string | null;
  name: string;
  letter: string;
  designers: string[] | null;
  roundNumber: number | null;
  score: number | null;
  uScore: number | null;
  rank: number | null;
  rankLow: number | null;
  rankHigh: number | null;
  pFirst: number | null;
  letters: string | null;
  whyNotRanked: string | null;
  equalNoiseK: number | null;
  levelDifferenceDb: number | null;
  resistanceRatio: number | null;
}

/** A standing's rows, best first; a withdrawn entry keeps its row with its name and no address. */
export async function shownStandingRows(
  db: Handle,
  { standingId }: { standingId: string },
): Promise<ShownStandingRow[]> {
  return db("shown.standing_row as r")
    .leftJoin("shown.entry as e", "e.entry_id", "r.entry_id")
    .leftJoin("shown.withdrawal as w", "w.entry_id", "r.entry_id")
    .where("r.standing_id", standingId)
    .orderByRaw("r.rank nulls last, r.score, r.entry_id")
    .select({
      entryId: "r.entry_id",
      slug: "e.design_slug",
      name: db.raw("coalesce(e.design_name, w.design_name)"),
      letter: db.raw("coalesce(e.revision_letter, w.revision_letter)"),
      designers: "e.designers",
      roundNumber: "e.round_number",
      score: "r.score",
      uScore: "r.u_score",
      rank: "r.rank",
      rankLow: "r.rank_low",
      rankHigh: "r.rank_high",
      pFirst: "r.p_first",
      letters: "r.letters",
      whyNotRanked: "r.why_not_ranked",
      equalNoiseK: "e.equal_noise_k",
      levelDifferenceDb: "e.level_difference_db",
      resistanceRatio: "e.resistance_ratio",
    });
}
