import type { Bridge } from "@/lib/domain/scoring/round-input";
import type { Handle } from "../client/connect";

/** The newest bridge of thermal resistance for each pair of units, at the level nearest to the one asked for. */
export async function bridges(db: Handle, { levelDba }: { levelDba: number }): Promise<Bridge[]> {
  const { rows }: { rows: Bridge[] } = await db.raw(
    `select distinct on (unit_from, unit_to) unit_from as "fromUnit", unit_to as "toUnit", ratio, u, dof
     from bridge where quantity = 'thermal_resistance_kpw' and ratio is not null
     order by unit_from, unit_to, abs(coalesce(level_dba, :levelDba) - :levelDba), created_at desc`,
    { levelDba },
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
