import type { Bridge } from "@/lib/domain/scoring/round-input";
import type { Handle } from "../client/connect";

/**
 * The newest bridge of thermal resistance for each pair of units, either way, at the level nearest to the one asked for,
 * of those that there were at `asOf`: a later one doesn't move a standing that was drawn before it.
 * The other way round it is 1/r with u/r² (JCGM 100:2008, 5.1.2).
 */
export async function bridges(db: Handle, { levelDba, asOf }: { levelDba: number; asOf: Date }): Promise<Bridge[]> {
  const { rows }: { rows: Bridge[] } = await db.raw(
    `select distinct on (unit_from, unit_to) unit_from as "fromUnit", unit_to as "toUnit", ratio, u, dof
     from (
       select unit_from, unit_to, ratio, u, dof, level_dba, created_at, 0 as turned from bridge
       where quantity = 'thermal_resistance_kpw' and level_dba is not null
       union all
       select unit_to, unit_from, 1 / ratio, u / (ratio * ratio), dof, level_dba, created_at, 1 from bridge
       where quantity = 'thermal_resistance_kpw' and level_dba is not null) b
     where created_at <= :asOf
     order by unit_from, unit_to, abs(level_dba - :levelDba), created_at desc, turned`,
    { levelDba, asOf },
  );
  return rows;
}

/** The unit that a season's ratios are to: the first that counts in it. */
export async function seasonBaselineUnit(db: Handle, { seasonId }: { seasonId: string }): Promise<string | undefined> {
  const row = await db("season_baseline")
    .where({ season_id: seasonId })
    .orderBy(["from_at", "baseline_unit_id"])
    .first<{ baseline_unit_id: string } | undefined>("baseline_unit_id");
  return row?.baseline_unit_id;
}
