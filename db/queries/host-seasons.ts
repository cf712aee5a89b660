import type { NewSeason, SeasonChange } from "@/lib/contracts/seasons-admin";
import type { RuleKind } from "@/lib/domain/scoring/rules";
import type { RoundState } from "@/lib/domain/seasons/round-moves";
import type { Handle } from "../client/connect";

export interface SeasonHead {
  seasonId: string;
  number: number;
  openedAt: Date | null;
  closedAt: Date | null;
  frozenAt: Date | null;
}

/** What decides on what may be done with a season; with `lock` its row is held until the transaction ends. */
export async function seasonHead(
  db: Handle,
  { seasonId, lock = false }: { seasonId: string; lock?: boolean },
): Promise<SeasonHead | undefined> {
  return db("season")
    .where({ id: seasonId })
    .modify((query) => {
      if (lock) void query.forUpdate();
    })
    .first<SeasonHead | undefined>({
      seasonId: "id",
      number: "number",
      openedAt: "opened_at",
      closedAt: "closed_at",
      frozenAt: "frozen_at",
    });
}

export interface HostSeasonRow extends SeasonHead {
  slug: string;
  title: string;
  summary: string;
  rules: string;
  protocolVersionId: string;
  protocol: string;
  scoringRuleVersionId: string;
  rule: RuleKind;
  levelsDba: number[];
  headlineDba: number;
  frameIds: string[];
  totalDepthMaxMm: number | null;
  inletStackMaxMm: number | null;
  benchVersionId: string | null;
  budgetVersionId: string | null;
  baselineUnitId: string | null;
  entries: number;
}

/** Seasons with all that the host sets, the newest first; with an id that one alone. */
export async function hostSeasonRows(db: Handle, { seasonId }: { seasonId?: string } = {}): Promise<HostSeasonRow[]> {
  const { rows }: { rows: HostSeasonRow[] } = await db.raw(
    `select s.id as "seasonId", s.number, s.slug, s.title, s.summary, s.rules, s.protocol_version_id as "protocolVersionId",
       p.name || ', version ' || v.number as protocol, s.scoring_rule_version_id as "scoringRuleVersionId", u.kind as rule,
       s.levels_dba as "levelsDba", s.headline_dba as "headlineDba", s.total_depth_max_mm as "totalDepthMaxMm",
       s.inlet_stack_max_mm as "inletStackMaxMm", s.opened_at as "openedAt", s.closed_at as "closedAt", s.frozen_at as "frozenAt",
       array(select frame_id from season_frame f where f.season_id = s.id order by frame_id) as "frameIds",
       b.bench_version_id as "benchVersionId", b.budget_version_id as "budgetVersionId",
       (select x.baseline_unit_id from season_baseline x where x.season_id = s.id order by x.from_at desc, x.baseline_unit_id limit 1) as "baselineUnitId",
       (select count(*)::int from entry e where e.season_id = s.id) as entries
     from season s join protocol_version v on v.id = s.protocol_version_id join protocol p on p.id = v.protocol_id
       join scoring_rule_version u on u.id = s.scoring_rule_version_id
       left join lateral (select y.bench_version_id, y.budget_version_id from season_bench y
         where y.season_id = s.id order by y.from_at desc, y.bench_version_id limit 1) b on true
     where :seasonId::uuid is null or s.id = :seasonId::uuid order by s.number desc`,
    { seasonId: seasonId ?? null },
  );
  return rows;
}

export interface HostRoundRow {
  roundId: string;
  seasonId: string;
  number: number;
  title: string;
  state: RoundState;
  entries: number;
  publishAt: Date | null;
  publishedAt: Date | null;
}

/** Rounds with their states, by season and number; of one season, or one alone. */
export async function hostRoundRows(
  db: Handle,
  { seasonId, roundId }: { seasonId?: string; roundId?: string } = {},
): Promise<HostRoundRow[]> {
  const { rows }: { rows: HostRoundRow[] } = await db.raw(
    `select n.id as "roundId", n.season_id as "seasonId", n.number, n.title, n.state, n.publish_at as "publishAt",
       n.published_at as "publishedAt",
       (select count(*)::int from round_entry x where x.round_id = n.id and x.taken_out_at is null) as entries
     from round n where (:seasonId::uuid is null or n.season_id = :seasonId::uuid)
       and (:roundId::uuid is null or n.id = :roundId::uuid) order by n.season_id, n.number`,
    { seasonId: seasonId ?? null, roundId: roundId ?? null },
  );
  return rows;
}

const columns = (season: SeasonChange) => ({
  title: season.title,
  summary: season.summary,
  rules: season.rules,
  protocol_version_id: season.protocolVersionId,
  scoring_rule_version_id: season.scoringRuleVersionId,
  levels_dba: season.levelsDba,
  headline_dba: season.headlineDba,
  total_depth_max_mm: season.totalDepthMaxMm ?? null,
  inlet_stack_max_mm: season.inletStackMaxMm ?? null,
});

export async function insertSeason(db: Handle, season: NewSeason): Promise<string> {
  const [row]: { id: string }[] = await db("season")
    .insert({ number: season.number, slug: `season-${season.number}`, ...columns(season) })
    .returning("id");
  if (!row) throw new Error("no season came back");
  return row.id;
}

export async function updateSeason(
  db: Handle,
  { seasonId, season }: { seasonId: string; season: SeasonChange },
): Promise<void> {
  await db("season").where({ id: seasonId }).update(columns(season));
}

/** Sets what a season takes and runs on: its frames and, unless they stand, bench version with budget and baseline. */
export async function setSeasonParts(
  db: Handle,
  { seasonId, season, framesOnly = false }: { seasonId: string; season: SeasonChange; framesOnly?: boolean },
): Promise<void> {
  await db("season_frame").where({ season_id: seasonId }).delete();
  await db("season_frame").insert(season.frameIds.map((frame_id) => ({ season_id: seasonId, frame_id })));
  if (framesOnly) return;
  await db("season_bench").where({ season_id: seasonId }).delete();
  await db("season_bench").insert({
    season_id: seasonId,
    bench_version_id: season.benchVersionId,
    budget_version_id: season.budgetVersionId,
  });
  await db("season_baseline").where({ season_id: seasonId }).delete();
  await db("season_baseline").insert({ season_id: seasonId, baseline_unit_id: season.baselineUnitId });
}

export async function stampSeason(
  db: Handle,
  { seasonId, what, at }: { seasonId: string; what: "opened" | "closed"; at: Date },
): Promise<void> {
  await db("season")
    .where({ id: seasonId })
    .update(what === "opened" ? { opened_at: at } : { closed_at: at });
}

/** Adds the next round of a season. @returns its id */
export async function insertRound(
  db: Handle,
  { seasonId, title }: { seasonId: string; title: string },
): Promise<string> {
  const last = await db("round").where({ season_id: seasonId }).max<{ max: number | null }>("number as max").first();
  const number = (last?.max ?? 0) + 1;
  const [row]: { id: string }[] = await db("round")
    .insert({ season_id: seasonId, number, title: title === "" ? `Round ${number}` : title })
    .returning("id");
  if (!row) throw new Error("no round came back");
  return row.id;
}

export interface RoundRecordRow {
  moves: { at: string; from: RoundState; to: RoundState; by: string | null; reason: string | null }[];
  takenOut: { at: string; entryId: string; name: string; reason: string | null }[];
  lentTo: string | null;
}

/** What became of a round: its moves, entries taken out, and whom its review was lent to. */
export async function roundRecord(db: Handle, { roundId }: { roundId: string }): Promise<RoundRecordRow | undefined> {
  const { rows }: { rows: RoundRecordRow[] } = await db.raw(
    `select coalesce((select jsonb_agg(jsonb_build_object('at', m.at, 'from', m.from_state, 'to', m.to_state, 'by', p.handle, 'reason', m.reason)
         order by m.at, m.id) from round_move m left join person p on p.id = m.by_person where m.round_id = n.id), '[]') as moves,
       coalesce((select jsonb_agg(jsonb_build_object('at', x.taken_out_at, 'entryId', x.entry_id, 'name', d.name || ' ' || r.letter, 'reason', x.reason)
         order by x.taken_out_at) from round_entry x join entry e on e.id = x.entry_id join revision r on r.id = e.revision_id
         join design d on d.id = r.design_id where x.round_id = n.id and x.taken_out_at is not null), '[]') as "takenOut",
       (select coalesce(p.handle, 'former member') from review_loan l join person p on p.id = l.person_id where l.round_id = n.id) as "lentTo"
     from round n where n.id = :roundId`,
    { roundId },
  );
  return rows[0];
}

/** Lends the review of a round to one member; an earlier loan ends. */
export async function setLoan(
  db: Handle,
  { roundId, personId, byPerson, at }: { roundId: string; personId: string | null; byPerson: string; at: Date },
): Promise<void> {
  await db("review_loan").where({ round_id: roundId }).delete();
  if (personId !== null) {
    await db("review_loan").insert({ round_id: roundId, person_id: personId, by_person: byPerson, at });
  }
}

/** Snapshots of everything that is public now, a page at a time, for trying a choice of levels. */
export async function publishedSnapshots(db: Handle): Promise<{ entryId: string; snapshot: unknown }[]> {
  return db("published_entry as p")
    .join("publication as b", "b.id", "p.publication_id")
    .orderBy("p.entry_id")
    .select("p.entry_id as entryId", "b.snapshot");
}
