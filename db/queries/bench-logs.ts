import type { Handle } from "../client/connect";

export interface LogFileInsert {
  fileId: string;
  sessionId: string;
  runId: string | null;
  kind: "temperature" | "level" | "recording";
  name: string;
  columnsRecognised: readonly unknown[];
  columnsConfirmed: Record<string, unknown>;
  rowsRead: number;
  refusedCount: number;
  analysis: Record<string, unknown>;
  byPerson: string;
}

/** The file of that content: the row there is, or a new one. */
export async function keepFile(
  db: Handle,
  file: { sha256: string; bytes: number; storageKey: string; receivedFrom: string },
): Promise<string> {
  await db("file")
    .insert({
      sha256: file.sha256,
      bytes: file.bytes,
      kind: "csv",
      state: "read",
      storage_key: file.storageKey,
      received_from: file.receivedFrom,
    })
    .onConflict("sha256")
    .ignore();
  const row = await db("file").where({ sha256: file.sha256 }).first<{ id: string } | undefined>("id");
  if (!row) throw new Error("no file came back");
  return row.id;
}

export async function insertLogFile(db: Handle, log: LogFileInsert): Promise<string> {
  const [made]: { id: string }[] = await db("log_file")
    .insert({
      file_id: log.fileId,
      session_id: log.sessionId,
      run_id: log.runId,
      kind: log.kind,
      name: log.name,
      columns_recognised: JSON.stringify(log.columnsRecognised),
      columns_confirmed: JSON.stringify(log.columnsConfirmed),
      rows_read: log.rowsRead,
      refused_count: log.refusedCount,
      analysis: JSON.stringify(log.analysis),
      by_person: log.byPerson,
    })
    .returning("id");
  if (!made) throw new Error("no log file came back");
  return made.id;
}

/** Rows of a log that were refused; one a line, the first reason where a line has several. */
export async function insertLogRefusals(
  db: Handle,
  { logFileId, refused }: { logFileId: string; refused: readonly { line: number; reason: string }[] },
): Promise<void> {
  const byLine = new Map(refused.map((each) => [each.line, each.reason]));
  const rows = [...byLine].map(([line, reason]) => ({ log_file_id: logFileId, line, reason }));
  await db.batchInsert("log_refusal", rows, 500);
}

export interface LogRow {
  id: string;
  runId: string | null;
  kind: string;
  name: string;
  rowsRead: number;
  refusedCount: number;
  at: Date;
  refused: { line: number; reason: string }[];
}

/** Logs of a session, the oldest first, each with its first hundred refused rows. */
export async function logsOfSession(db: Handle, { sessionId }: { sessionId: string }): Promise<LogRow[]> {
  const { rows }: { rows: LogRow[] } = await db.raw(
    `select l.id, l.run_id as "runId", l.kind, l.name, l.rows_read as "rowsRead", l.refused_count as "refusedCount", l.at,
       coalesce((select json_agg(json_build_object('line', x.line, 'reason', x.reason) order by x.line)
         from (select line, reason from log_refusal where log_file_id = l.id order by line limit 100) x), '[]') as refused
     from log_file l where l.session_id = :sessionId order by l.at, l.id`,
    { sessionId },
  );
  return rows;
}
