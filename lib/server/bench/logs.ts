import { appDb } from "@/db/client/handles";
import { insertLogFile, insertLogRefusals, keepFile } from "@/db/queries/bench-logs";
import { changeRun, insertReadings } from "@/db/queries/bench-runs";
import { protocolOf } from "@/db/queries/bench-sessions";
import { logBytesMax, logPreview, type LogAnswer, type LogQuery } from "@/lib/contracts/bench-logs";
import { ExpectedError } from "@/lib/domain/expected-error";
import { storage } from "@/lib/services/storage/from-env";
import { note, type Asked } from "../audit/audit";
import { checkRunReadings, demandKept, demandRun, movedOn } from "./runs";
import { spoolLog, tooLarge, type SpooledLog } from "./spool-log";

/**
 * Takes a log in for a run of an open session. Without `commit` it only says what it reads; with it the file is kept as
 * received, with each refused row, and where it is steady its reading is added. A record that isn't steady is kept and
 * gives no reading: the answer says which clause failed.
 * @throws ExpectedError malformed, too_large, moved_on, impossible, already_there, forbidden
 */
export async function takeLog(
  asked: Asked,
  { sessionId, query, request }: { sessionId: string; query: LogQuery; request: Request },
): Promise<LogAnswer> {
  const { run, session } = await demandRun(appDb(), asked, query.runId);
  if (run.sessionId !== sessionId) throw new ExpectedError("not_found", "There is no such run in this session.");
  demandKept(run);
  demandCsv(request);
  const confirmed = query.commit === "yes";
  if (confirmed) demandConfirmed(query);
  const protocol = await protocolOf(appDb(), { protocolVersionId: session.protocolVersionId });
  const { sensor, ambient, level } = query;
  const named =
    query.kind === "level" ? { ...(level && { level }) } : { ...(sensor && { sensor }), ...(ambient && { ambient }) };
  const { epsilonK, ambientDriftMaxK, levelAverageS } = protocol;
  const order = { kind: query.kind, choice: named, epsilonK, ambientDriftMaxK, levelAverageS };
  return spoolLog(request.body, order, async (spooled) => {
    const kept = confirmed ? await keep(asked, query, spooled) : undefined;
    const { sha256, bytes, found } = spooled;
    const { reading: _reading, ...said } = found;
    return {
      ...{ sha256, bytes },
      ...logPreview.parse(said),
      logFileId: kept?.logFileId ?? null,
      readingIds: kept?.readingIds ?? [],
      version: kept?.version ?? null,
    };
  });
}

/** @throws ExpectedError wrong_kind, too_large, before anything is taken in */
function demandCsv({ headers }: Request): void {
  const kind = headers.get("content-type")?.split(";")[0]?.trim().toLowerCase();
  if (kind !== "text/csv") throw new ExpectedError("wrong_kind", "Send the log as text/csv.");
  if (Number(headers.get("content-length") ?? 0) > logBytesMax) throw tooLarge();
}

function demandConfirmed(query: LogQuery): void {
  const needed = query.kind === "level" ? (["level", "positionId"] as const) : (["sensor", "ambient"] as const);
  const fields = [...needed, "version" as const]
    .filter((name) => query[name] === undefined)
    .map((path) => ({ path, message: "is not confirmed" }));
  if (fields.length > 0) throw new ExpectedError("malformed", "Confirm the columns before the log is kept.", fields);
}

async function keep(
  asked: Asked,
  query: LogQuery,
  { sha256, bytes, stream, found: report }: SpooledLog,
): Promise<{ logFileId: string; readingIds: string[]; version: number }> {
  const storageKey = `files/${sha256.slice(0, 2)}/${sha256}`;
  if (!(await storage().head(storageKey))) await storage().put(storageKey, stream(), bytes);
  return appDb().transaction(async (tx) => {
    const { run, session, person } = await demandRun(tx, asked, query.runId);
    demandKept(run);
    const version = query.version ?? run.version;
    if (!(await changeRun(tx, { runId: run.id, version }))) throw new ExpectedError("moved_on", movedOn);
    const fileId = await keepFile(tx, { sha256, bytes, storageKey, receivedFrom: person.personId });
    const { sensor, ambient, level, positionId } = query;
    const logFileId = await insertLogFile(tx, {
      ...{ fileId, sessionId: session.id, runId: run.id, kind: query.kind, name: query.name },
      columnsRecognised: report.columns,
      columnsConfirmed: { sensor, ambient, level, positionId },
      rowsRead: report.rows,
      refusedCount: report.refusedCount,
      analysis: { temperature: report.temperature, level: report.level, warnings: report.warnings },
      byPerson: person.personId,
    });
    await insertLogRefusals(tx, { logFileId, refused: report.refused });
    await note(tx, asked, { action: "log.keep", subjectKind: "run", subjectId: run.id, after: { logFileId, sha256 } });
    const found = report.reading;
    if (!found) return { logFileId, readingIds: [], version: version + 1 };
    const reading = { ...found, positionId: found.quantity === "level_dba" ? (positionId ?? null) : null };
    await checkRunReadings(tx, { session, runId: run.id, readings: [reading] });
    const readingIds = await insertReadings(tx, [
      {
        ...{ sessionId: session.id, runId: run.id, ...reading },
        source: "log",
        logFileId,
        takenBy: person.personId,
      },
    ]);
    return { logFileId, readingIds, version: version + 1 };
  });
}
