import type { Handle } from "../../client/connect";

export interface ShownRunRow {
  runId: string;
  setSpeed: number;
  mountNumber: number;
  repeatNumber: number;
  ordinal: number;
  state: string;
  reason: string | null;
  beganAt: Date;
}

export interface ShownReadingRow {
  id: string;
  runId: string | null;
  quantity: string;
  position: string | null;
  phase: string | null;
  rotorPosition: number | null;
  value: number;
  unit: string;
  source: string;
  supersedes: string | null;
  supersededBy: string | null;
  reason: string | null;
  takenAt: Date;
}

/** The runs of an entry, or of a baseline unit, in a published session, in the order they were made. */
export async function shownRuns(
  db: Handle,
  { sessionId, entryId, baselineUnitId }: { sessionId: string; entryId?: string; baselineUnitId?: string },
): Promise<ShownRunRow[]> {
  return db("shown.run")
    .where({
      session_id: sessionId,
      ...(entryId ? { entry_id: entryId } : { baseline_unit_id: baselineUnitId ?? null }),
    })
    .orderBy("ordinal")
    .select({
      runId: "id",
      setSpeed: "set_speed",
      mountNumber: "mount_number",
      repeatNumber: "repeat_number",
      ordinal: "ordinal",
      state: "state",
      reason: "reason",
      beganAt: "began_at",
    });
}

/** Readings of these runs, superseded ones too; with `sessionId` also those of the session itself (checks, background). */
export async function shownReadings(
  db: Handle,
  { runIds, sessionId }: { runIds: readonly string[]; sessionId?: string },
): Promise<ShownReadingRow[]> {
  return db("shown.reading as r")
    .leftJoin("shown.microphone_position as m", "m.id", "r.position_id")
    .leftJoin("shown.reading as n", "n.supersedes", "r.id")
    .where((either) => {
      void either.whereIn("r.run_id", [...runIds]);
      if (sessionId) void either.orWhere((own) => void own.whereNull("r.run_id").where("r.session_id", sessionId));
    })
    .orderBy(["r.taken_at", "r.id"])
    .select({
      id: "r.id",
      runId: "r.run_id",
      quantity: "r.quantity",
      position: "m.name",
      phase: "r.phase",
      rotorPosition: "r.rotor_position",
      value: "r.value",
      unit: "r.unit",
      source: "r.source",
      supersedes: "r.supersedes",
      supersededBy: "n.id",
      reason: "r.reason",
      takenAt: "r.taken_at",
    });
}
