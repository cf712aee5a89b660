import type { ControlPoint, ControlQuantity } from "@/lib/domain/baselines/control-point";
import type { SeriesCheck } from "@/lib/domain/baselines/session-control";
import type { Handle } from "../client/connect";

export type BreakKind = "unit" | "bench" | "service" | "other";

export interface ControlBreakRow {
  id: string;
  benchVersionId: string;
  baselineUnitId: string | null;
  kind: BreakKind;
  reason: string;
  fromAt: Date;
  byPerson: string;
}

export interface CheckRow {
  sessionId: string;
  quantity: ControlQuantity;
  setSpeed: number | null;
  value: number;
  chart: Partial<ControlPoint>;
  ruleBroken: string | null;
  at: Date;
}

type Pair = { benchVersionId: string; baselineUnitId: string };

/** Documented changes that count for a unit on a bench version, the oldest first. */
export async function controlBreaks(db: Handle, { benchVersionId, baselineUnitId }: Pair): Promise<ControlBreakRow[]> {
  return db("control_break")
    .where({ bench_version_id: benchVersionId })
    .where((either) => void either.whereNull("baseline_unit_id").orWhere({ baseline_unit_id: baselineUnitId }))
    .orderBy(["from_at", "created_at"])
    .select<ControlBreakRow[]>({
      id: "id",
      benchVersionId: "bench_version_id",
      baselineUnitId: "baseline_unit_id",
      kind: "kind",
      reason: "reason",
      fromAt: "from_at",
      byPerson: "by_person",
    });
}

export async function insertBreak(db: Handle, row: Omit<ControlBreakRow, "id"> & { at: Date }): Promise<string> {
  const [made]: { id: string }[] = await db("control_break")
    .insert({
      bench_version_id: row.benchVersionId,
      baseline_unit_id: row.baselineUnitId,
      kind: row.kind,
      reason: row.reason,
      from_at: row.fromAt,
      by_person: row.byPerson,
      created_at: row.at,
    })
    .returning("id");
  if (!made) throw new Error("no break came back");
  return made.id;
}

const checkColumns = {
  sessionId: "session_id",
  quantity: "quantity",
  setSpeed: "set_speed",
  value: "value",
  chart: "chart",
  ruleBroken: "rule_broken",
  at: "at",
};

/** Check values of a unit on a bench version, in order of time. */
export async function checksOf(db: Handle, { benchVersionId, baselineUnitId }: Pair): Promise<CheckRow[]> {
  return db("baseline_check")
    .where({ bench_version_id: benchVersionId, baseline_unit_id: baselineUnitId })
    .orderBy(["at", "session_id"])
    .select<CheckRow[]>(checkColumns);
}

/** A closed session's check values as they were judged. */
export async function checksOfSession(db: Handle, { sessionId }: { sessionId: string }): Promise<CheckRow[]> {
  return db("baseline_check")
    .where({ session_id: sessionId })
    .orderBy(["quantity", "set_speed"])
    .select<CheckRow[]>(checkColumns);
}

/** Puts a session's check values in the place of those that it had. */
export async function replaceChecks(
  db: Handle,
  {
    sessionId,
    benchVersionId,
    baselineUnitId,
    at,
    checks,
  }: Pair & { sessionId: string; at: Date; checks: readonly SeriesCheck[] },
): Promise<void> {
  await db("baseline_check").where({ session_id: sessionId, baseline_unit_id: baselineUnitId }).delete();
  if (checks.length === 0) return;
  await db("baseline_check").insert(
    checks.map(({ quantity, setSpeed, value, ...chart }) => ({
      baseline_unit_id: baselineUnitId,
      bench_version_id: benchVersionId,
      session_id: sessionId,
      quantity,
      set_speed: setSpeed,
      value,
      chart: JSON.stringify(chart),
      rule_broken: chart.out.length > 0 ? chart.out.join(", ") : null,
      at,
    })),
  );
}

export interface FrozenRow {
  quantity: ControlQuantity;
  setSpeed: number | null;
  breakId: string | null;
  centre: number;
  sigma: number;
  fromAt: Date;
}

/** Frozen limits of a unit on a bench version. */
export async function frozenLimits(db: Handle, { benchVersionId, baselineUnitId }: Pair): Promise<FrozenRow[]> {
  return db("control_phase")
    .where({ bench_version_id: benchVersionId, baseline_unit_id: baselineUnitId, trial: false })
    .select<FrozenRow[]>({
      quantity: "quantity",
      setSpeed: "set_speed",
      breakId: "break_id",
      centre: "centre",
      sigma: "sigma",
      fromAt: "from_at",
    });
}

export interface PhaseInsert extends Pair {
  quantity: ControlQuantity;
  setSpeed: number | null;
  breakId: string | null;
  centre: number | null;
  sigma: number | null;
  trial: boolean;
  fromAt: Date;
  reason: string;
  byPerson: string | null;
}

/** Adds phases, and limits that freeze; one that is there stays as it is. */
export async function insertPhases(db: Handle, phases: readonly PhaseInsert[]): Promise<void> {
  if (phases.length === 0) return;
  const rows = phases.map((phase) => ({
    baseline_unit_id: phase.baselineUnitId,
    bench_version_id: phase.benchVersionId,
    quantity: phase.quantity,
    set_speed: phase.setSpeed,
    break_id: phase.breakId,
    centre: phase.centre,
    sigma: phase.sigma,
    trial: phase.trial,
    from_at: phase.fromAt,
    reason: phase.reason,
    by_person: phase.byPerson,
  }));
  await db("control_phase").insert(rows).onConflict().ignore();
}

/** Closed sessions of a unit on a bench version from a moment on, the oldest first. */
export async function closedSessionsFrom(
  db: Handle,
  { benchVersionId, baselineUnitId, from }: { benchVersionId: string; baselineUnitId: string | null; from: Date },
): Promise<{ id: string; number: number; roundId: string | null; operatorId: string }[]> {
  return db("session")
    .where({ bench_version_id: benchVersionId })
    .modify((query) => void (baselineUnitId && query.where({ baseline_unit_id: baselineUnitId })))
    .where("began_at", ">=", from)
    .whereNotNull("ended_at")
    .orderBy(["began_at", "id"])
    .select({ id: "id", number: "number", roundId: "round_id", operatorId: "operator_id" });
}
