import type { Handle } from "../client/connect";

export async function insertCalibration(
  db: Handle,
  check: {
    sessionId: string;
    positionId: string;
    phase: "before" | "after";
    calibratorLevelDb: number;
    readingId: string;
  },
): Promise<void> {
  await db("calibration_check").insert({
    session_id: check.sessionId,
    position_id: check.positionId,
    phase: check.phase,
    calibrator_level_db: check.calibratorLevelDb,
    reading_id: check.readingId,
  });
}

export async function insertBackground(
  db: Handle,
  check: { sessionId: string; positionId: string; heated: boolean; durationS: number; readingId: string },
): Promise<void> {
  await db("background_level").insert({
    session_id: check.sessionId,
    position_id: check.positionId,
    heated: check.heated,
    duration_s: check.durationS,
    reading_id: check.readingId,
  });
}

export async function backgroundsOfSession(
  db: Handle,
  { sessionId }: { sessionId: string },
): Promise<{ readingId: string; heated: boolean; durationS: number | null }[]> {
  return db("background_level")
    .where({ session_id: sessionId })
    .orderBy(["at", "id"])
    .select({ readingId: "reading_id", heated: "heated", durationS: "duration_s" });
}
