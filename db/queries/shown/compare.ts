import type { RuleKind } from "@/lib/domain/scoring/rules";
import type { Handle } from "../../client/connect";

export interface EntryRankRow {
  entryId: string;
  ruleKind: RuleKind;
  ruleName: string;
  /** Null for the season's standing. */
  roundId: string | null;
  rank: number | null;
  rankLow: number | null;
  rankHigh: number | null;
  of: number;
  whyNotRanked: string | null;
  asOf: Date;
}

/** Where these entries stand in the newest standing of their round and season under every rule. */
export async function shownRanks(db: Handle, { entryIds }: { entryIds: readonly string[] }): Promise<EntryRankRow[]> {
  const { rows }: { rows: EntryRankRow[] } = await db.raw(
    `with newest as (
       select distinct on (t.season_id, t.round_id, t.rule_version_id)
         t.id, t.round_id, t.as_of, v.kind, v.rule_name
       from shown.standing t join shown.scoring_rule_version v on v.id = t.rule_version_id
       where t.season_id in (select season_id from shown.entry where entry_id = any (:ids))
       order by t.season_id, t.round_id, t.rule_version_id, t.number desc)
     select r.entry_id as "entryId", n.kind as "ruleKind", n.rule_name as "ruleName", n.round_id as "roundId", r.rank,
       r.rank_low as "rankLow", r.rank_high as "rankHigh", r.why_not_ranked as "whyNotRanked", n.as_of as "asOf",
       (select count(o.rank)::int from shown.standing_row o where o.standing_id = n.id) as "of"
     from newest n join shown.standing_row r on r.standing_id = n.id
     where r.entry_id = any (:ids)
     order by n.kind, n.rule_name, n.round_id nulls last`,
    { ids: [...entryIds] },
  );
  return rows;
}

export interface BridgeRow {
  fromUnit: string;
  ratio: number;
  u: number;
  dof: number | null;
}

/**
 * Public bridges of thermal resistance to a baseline unit: what a ratio to `fromUnit` is multiplied by to be one to
 * `toUnit`. Of several from one unit the one at the level nearest to the one asked for, then the newest.
 */
export async function shownBridges(
  db: Handle,
  { toUnit, levelDba }: { toUnit: string; levelDba: number },
): Promise<BridgeRow[]> {
  const { rows }: { rows: BridgeRow[] } = await db.raw(
    `select distinct on (unit_from) unit_from as "fromUnit", ratio, u, dof from shown.bridge
     where unit_to = :toUnit and quantity = 'thermal_resistance_kpw' and ratio is not null
     order by unit_from, abs(coalesce(level_dba, :levelDba) - :levelDba), created_at desc`,
    { toUnit, levelDba },
  );
  return rows;
}

/** What is known of the baselines' own traits, by unit: only the number of blades is declared. */
export async function shownBaselineTraits(
  db: Handle,
  { unitIds }: { unitIds: readonly string[] },
): Promise<{ unitId: string; blades: number | null }[]> {
  return db("shown.baseline_unit as u")
    .join("shown.baseline as b", "b.id", "u.baseline_id")
    .whereIn("u.id", [...unitIds])
    .select({ unitId: "u.id", blades: "b.blades" });
}
