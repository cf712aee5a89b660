import type { Knex } from "knex";

export interface DemoAgreedValue {
  quantity: "level_dba" | "thermal_resistance_kpw";
  setSpeed: number;
  value: number;
  u: number;
}

/** Writes what a unit is agreed to read on a bench version, with the sessions that it comes from. */
export async function insertAgreedValues(
  db: Knex,
  {
    unitId,
    benchVersionId,
    from,
    reason,
    sessionIds,
    values,
  }: {
    unitId: string;
    benchVersionId: string;
    from: Date;
    reason: string;
    sessionIds: readonly string[];
    values: readonly DemoAgreedValue[];
  },
): Promise<void> {
  if (values.length === 0) return;
  await db("baseline_value").insert(
    values.map(({ quantity, setSpeed, value, u }) => ({
      baseline_unit_id: unitId,
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

export interface DemoBridge {
  levelDba: number;
  ratio: number;
  u: number;
  dof: number | null;
}

/** Writes what ratios to one unit are multiplied by to be ratios to another, by level, from a session that ran both. */
export async function insertBridges(
  db: Knex,
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
    bridges: readonly DemoBridge[];
  },
): Promise<void> {
  if (bridges.length === 0) return;
  await db("bridge").insert(
    bridges.map(({ levelDba, ratio, u, dof }) => ({
      unit_from: fromUnitId,
      unit_to: toUnitId,
      bench_version_id: benchVersionId,
      quantity: "thermal_resistance_kpw",
      level_dba: levelDba,
      ratio,
      u,
      dof,
      session_ids: [sessionId],
      created_at: at,
    })),
  );
}
