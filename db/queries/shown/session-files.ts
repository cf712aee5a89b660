import type { Handle } from "../../client/connect";

export interface SessionFileRow {
  id: string;
  runId: string | null;
  kind: "temperature" | "level" | "recording";
  rowsRead: number;
  refusedCount: number;
  bytes: number;
  sha256: string;
  storageKey: string;
  state: "read" | "taken_down";
  takenDownAt: Date | null;
  reason: string | null;
  /** False for a recording that nobody has listened to yet. */
  cleared: boolean;
  at: Date;
}

const columns = {
  id: "id",
  runId: "run_id",
  kind: "kind",
  rowsRead: "rows_read",
  refusedCount: "refused_count",
  bytes: "bytes",
  sha256: "sha256",
  storageKey: "storage_key",
  state: "state",
  takenDownAt: "taken_down_at",
  reason: "reason",
  cleared: "cleared",
  at: "at",
} as const;

/** Public logs and recordings of these runs and of the session itself, in the order they were kept. */
export async function shownSessionFiles(
  publicReader: Handle,
  { sessionId, runIds }: { sessionId: string; runIds: readonly string[] },
): Promise<SessionFileRow[]> {
  return publicReader("shown.log_file")
    .where({ session_id: sessionId })
    .where((either) => void either.whereNull("run_id").orWhereIn("run_id", [...runIds]))
    .orderBy(["at", "id"])
    .select<SessionFileRow[]>(columns);
}

/** One public log or recording. */
export async function shownSessionFile(
  publicReader: Handle,
  { fileId }: { fileId: string },
): Promise<SessionFileRow | undefined> {
  return publicReader("shown.log_file").where({ id: fileId }).first<SessionFileRow | undefined>(columns);
}
