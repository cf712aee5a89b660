import type { UnitBridge } from "@/lib/domain/baselines/bridge-units";
import type { Handle } from "../client/connect";

export interface AgreedValueRow {
  quantity: "level_dba" | "thermal_resistance_kpw";
  setSpeed: number;
  value: number;
  u: number;
}

/** Writes what a unit is agreed to read on a bench version, with the sessions that it comes from; never over an old value. */
export async function insertAgreedValues(
  db: Handle,
  {
    baselineUnitId,
    benchVersionId,
    from,
    reason,
    sessionIds,
    values,
  }: {
    baselineUnitId: string;
    benchVersionId: string;
    from: Date;
    reason: string;
    sessionIds: readonly string[];
    values: readonly AgreedValueRow[];
  },
): Promise<void> {
  if (values.length === 0) return;
  await db("baseline_value").insert(
    values.map(({ quantity, setSpeed, value, u }) => ({
      baseline_unit_id: baselineUnitId,
      bench_version_id: benchVersionId,
      quantity,
      set_speed: setSpeed,
      value,
      u,
      from_at: from,
      reason,
      session_ids: [...sessionIds],
      created_at: from,
    })),
  );
}

/** Writes how one unit stands to another, from a session that ran both. */
export async function insertBridges(
  db: Handle,
  {
    fromUnitId,
    toUnitId,
    benchVersionId,
    sessionId,
    at,
    bridges,
  }: {
    fromUnitId: string;
    toUnitId: string;
    benchVersionId: string;
    sessionId: string;
    at: Date;
    bridges: readonly UnitBridge[];
  },
): Promise<void> {
  if (bridges.length === 0) return;
  await db("bridge").insert(
    bridges.map(({ quantity, setSpeed, levelDba, ratio, difference, u, dof }) => ({
      unit_from: fromUnitId,
      unit_to: toUnitId,
      bench_version_id: benchVersionId,
      quantity,
      set_speed: setSpeed,
      level_dba: levelDba,
      ratio,
      difference,
      u,
      dof,
      session_ids: [sessionId],
      created_at: at,
    })),
  );
}

/** Whether agreed values or bridges came from a session already. */
export async function settledAlready(db: Handle, { sessionId }: { sessionId: string }): Promise<boolean> {
  const { rows }: { rows: { settled: boolean }[] } = await db.raw(
    `select exists (select 1 from baseline_value where :sessionId::uuid = any (session_ids))
       or exists (select 1 from bridge where :sessionId::uuid = any (session_ids)) as settled`,
    { sessionId },
  );
  return rows[0]?.settled ?? false;
}

/** Declared levels of the seasons that count one of these units, dB(A), rising. */
export async function levelsOfUnits(db: Handle, { unitIds }: { unitIds: readonly string[] }): Promise<number[]> {
  const { rows }: { rows: { level: number }[] } = await db.raw(
    `select distinct unnest(s.levels_dba) as level from season s join season_baseline b on b.season_id = s.id
     where b.baseline_unit_id = any (:unitIds::uuid[]) order by level`,
    { unitIds: [...unitIds] },
  );
  return rows.map((row) => row.level);
}

/** Set speeds at which a bench version is qualified: agreed values of a qualification session stand there. */
export async function qualifiedSpeeds(db: Handle, { benchVersionId }: { benchVersionId: string }): Promise<number[]> {
  const { rows }: { rows: { speed: number }[] } = await db.raw(
    `select distinct v.set_speed as speed from baseline_value v join session s on s.id = any (v.session_ids)
     where v.bench_version_id = :benchVersionId and s.bench_version_id = :benchVersionId and s.purpose = 'qualification'
       and v.quantity = 'thermal_resistance_kpw' order by v.set_speed`,
    { benchVersionId },
  );
  return rows.map((row) => row.speed);
}

/** Bench versions of a season with the set speeds of its protocol. */
export async function benchesOfSeason(
  db: Handle,
  { seasonId }: { seasonId: string },
): Promise<{ benchVersionId: string; bench: string; setSpeeds: number[]; setting: "rpm" | "drive_percent" }[]> {
  return db("season_bench as sb")
    .join("season as s", "s.id", "sb.season_id")
    .join("protocol_version as p", "p.id", "s.protocol_version_id")
    .join("bench_version as v", "v.id", "sb.bench_version_id")
    .join("bench as b", "b.id", "v.bench_id")
    .where("sb.season_id", seasonId)
    .orderBy(["b.name", "v.number"])
    .select({
      benchVersionId: "v.id",
      bench: db.raw("b.name || ', version ' || v.number"),
      setSpeeds: "p.set_speeds",
      setting: "p.setting",
    });
}
