import type { Handle } from "../client/connect";

export interface ResultRow {
  id: string;
  session_id: string;
  entry_id: string | null;
  specimen_id: string | null;
  baseline_unit_id: string | null;
  set_speed: number;
  position_id: string | null;
  quantity: "level_dba" | "delta_t_k" | "thermal_resistance_kpw";
  value: number;
  u_own_run: number;
  u_own_mount: number;
  u_shared_offset: number;
  u_shared_gain: number;
  dof: number | null;
  upper_bound: boolean;
  runs: number;
  method_version: number;
  reading_ids: string[];
  detail: Record<string, unknown>;
}

export interface ComparisonRow {
  result_id: string;
  baseline_result_id: string;
  difference: number;
  u_difference: number;
  ratio: number | null;
  u_ratio: number | null;
  dof: number | null;
}

export interface CurveRow {
  session_id: string;
  entry_id: string | null;
  baseline_unit_id: string | null;
  position_id: string | null;
  points: unknown;
  equal_noise: unknown;
  method_version: number;
}

/** Puts a session's results in the place of those it had; publications keep their own copy, so nothing public moves. */
export async function replaceResults(
  db: Handle,
  {
    sessionId,
    results,
    comparisons,
    curves,
  }: { sessionId: string; results: ResultRow[]; comparisons: ComparisonRow[]; curves: CurveRow[] },
): Promise<void> {
  await db("result").where({ session_id: sessionId }).delete();
  await db("curve").where({ session_id: sessionId }).delete();
  if (results.length > 0) await db.batchInsert("result", results, 200);
  if (comparisons.length > 0) await db.batchInsert("comparison", comparisons, 200);
  const written = curves.map((row) => ({
    ...row,
    points: JSON.stringify(row.points),
    equal_noise: JSON.stringify(row.equal_noise),
  }));
  if (written.length > 0) await db.batchInsert("curve", written, 200);
}

/** The stored results of some sessions, in a stable order. */
export async function resultsOfSessions(
  db: Handle,
  { sessionIds }: { sessionIds: readonly string[] },
): Promise<ResultRow[]> {
  return db("result")
    .whereIn("session_id", [...sessionIds])
    .orderBy(["session_id", "entry_id", "baseline_unit_id", "set_speed", "position_id", "quantity"])
    .select("*");
}
