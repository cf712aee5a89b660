import type { Handle } from "../client/connect";

export interface RunRow {
  id: string;
  sessionId: string;
  entryId: string | null;
  specimenId: string | null;
  baselineUnitId: string | null;
  setSpeed: number;
  mountNumber: number;
  repeatNumber: number;
  ordinal: number;
  state: "open" | "done" | "held" | "discarded";
  reason: string | null;
  version: number;
  byPerson: string;
  beganAt: Date;
}

const runColumns = {
  id: "id",
  sessionId: "session_id",
  entryId: "entry_id",
  specimenId: "specimen_id",
  baselineUnitId: "baseline_unit_id",
  setSpeed: "set_speed",
  mountNumber: "mount_number",
  repeatNumber: "repeat_number",
  ordinal: "ordinal",
  state: "state",
  reason: "reason",
  version: "version",
  byPerson: "by_person",
  beganAt: "began_at",
} as const;

export async function runsOfSession(db: Handle, { sessionId }: { sessionId: string }): Promise<RunRow[]> {
  return db("run").where({ session_id: sessionId }).orderBy("ordinal").select<RunRow[]>(runColumns);
}

export async function runById(db: Handle, { runId }: { runId: string }): Promise<RunRow | undefined> {
  return db("run").where({ id: runId }).first<RunRow | undefined>(runColumns);
}

export interface RunInsert {
  sessionId: string;
  entryId: string | null;
  specimenId: string | null;
  baselineUnitId: string | null;
  setSpeed: number;
  mountNumber: number;
  repeatNumber: number;
  byPerson: string;
}

/** Adds the next run of a session; the caller holds the session's row, so that ordinals do not collide. */
export async function insertRun(db: Handle, run: RunInsert): Promise<string> {
  const last = await db("run")
    .where({ session_id: run.sessionId })
    .max<{ max: number | null }>("ordinal as max")
    .first();
  const [made]: { id: string }[] = await db("run")
    .insert({
      session_id: run.sessionId,
      entry_id: run.entryId,
      specimen_id: run.specimenId,
      baseline_unit_id: run.baselineUnitId,
      set_speed: run.setSpeed,
      mount_number: run.mountNumber,
      repeat_number: run.repeatNumber,
      ordinal: (last?.max ?? 0) + 1,
      by_person: run.byPerson,
    })
    .returning("id");
  if (!made) throw new Error("no run came back");
  return made.id;
}

/** Changes a run if it still has this version; the version goes up by one. @returns whether it had */
export async function changeRun(
  db: Handle,
  {
    runId,
    version,
    state,
    reason,
  }: { runId: string; version: number; state?: RunRow["state"]; reason?: string | null },
): Promise<boolean> {
  const changed = await db("run")
    .where({ id: runId, version })
    .update({ version: version + 1, ...(state && { state }), ...(reason !== undefined && { reason }) });
  return changed === 1;
}

export interface ReadingInsert {
  sessionId: string;
  runId: string | null;
  positionId?: string | null;
  quantity: string;
  phase?: "before" | "after" | null;
  rotorPosition?: number | null;
  value: number;
  unit: string;
  source: "typed" | "pasted" | "log" | "recording";
  logFileId?: string | null;
  detail?: Record<string, unknown>;
  supersedes?: string | null;
  reviewId?: string | null;
  correctionId?: string | null;
  reason?: string | null;
  takenBy: string;
}

/** Adds readings; none is ever changed. @returns their ids in order */
export async function insertReadings(db: Handle, readings: readonly ReadingInsert[]): Promise<string[]> {
  if (readings.length === 0) return [];
  const rows: { id: string }[] = await db("reading")
    .insert(
      readings.map((each) => ({
        session_id: each.sessionId,
        run_id: each.runId,
        position_id: each.positionId ?? null,
        quantity: each.quantity,
        phase: each.phase ?? null,
        rotor_position: each.rotorPosition ?? null,
        value: each.value,
        unit: each.unit,
        source: each.source,
        log_file_id: each.logFileId ?? null,
        detail: JSON.stringify(each.detail ?? {}),
        supersedes: each.supersedes ?? null,
        review_id: each.reviewId ?? null,
        correction_id: each.correctionId ?? null,
        reason: each.reason ?? null,
        taken_by: each.takenBy,
      })),
    )
    .returning("id");
  return rows.map((row) => row.id);
}

export interface BenchReading {
  id: string;
  runId: string | null;
  quantity: string;
  positionId: string | null;
  phase: "before" | "after" | null;
  rotorPosition: number | null;
  value: number;
  unit: string;
  source: string;
  detail: Record<string, unknown>;
  supersedes: string | null;
  supersededBy: string | null;
  reason: string | null;
  takenBy: string;
  takenAt: Date;
}

const readingSelect = {
  id: "r.id",
  runId: "r.run_id",
  quantity: "r.quantity",
  positionId: "r.position_id",
  phase: "r.phase",
  rotorPosition: "r.rotor_position",
  value: "r.value",
  unit: "r.unit",
  source: "r.source",
  detail: "r.detail",
  supersedes: "r.supersedes",
  supersededBy: "n.id",
  reason: "r.reason",
  takenBy: "r.taken_by",
  takenAt: "r.taken_at",
} as const;

/** All readings of a session, superseded ones too, in the order they came. */
export async function readingsOfSession(db: Handle, { sessionId }: { sessionId: string }): Promise<BenchReading[]> {
  return db("reading as r")
    .leftJoin("reading as n", "n.supersedes", "r.id")
    .where("r.session_id", sessionId)
    .orderBy(["r.taken_at", "r.id"])
    .select<BenchReading[]>(readingSelect);
}

export async function readingById(
  db: Handle,
  { readingId }: { readingId: string },
): Promise<(BenchReading & { sessionId: string }) | undefined> {
  return db("reading as r")
    .leftJoin("reading as n", "n.supersedes", "r.id")
    .where("r.id", readingId)
    .first<(BenchReading & { sessionId: string }) | undefined>({ ...readingSelect, sessionId: "r.session_id" });
}
