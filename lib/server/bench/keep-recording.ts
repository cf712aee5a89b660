import { appDb } from "@/db/client/handles";
import type { Handle } from "@/db/client/connect";
import { insertBackground, insertCalibration } from "@/db/queries/bench-checks";
import { insertLogFile } from "@/db/queries/bench-logs";
import { changeRun, insertReadings } from "@/db/queries/bench-runs";
import { benchVersionOf, type SessionHead } from "@/db/queries/bench-sessions";
import { keepRecordingAs, type RecordingRow } from "@/db/queries/recordings";
import { insertSpectra, standingSpectra } from "@/db/queries/spectra";
import type { Person } from "@/lib/domain/accounts/actor";
import type { RecordingResult } from "@/lib/domain/bench/read-recording";
import { ExpectedError } from "@/lib/domain/expected-error";
import { SOUND_READER_VERSION } from "@/lib/science/acoustics/reader-version";
import { note, type Asked } from "../audit/audit";
import { demandRecording } from "./recordings";
import { checkRunReadings, demandKept, demandRun, movedOn, standingOfRun } from "./runs";
import { checkSessionValue } from "./session-readings";

export interface Kept {
  logFileId: string;
  readingIds: string[];
  spectrumId: string;
  version: number | null;
}

interface Keeping {
  row: RecordingRow;
  result: RecordingResult;
  session: SessionHead;
  person: Person;
  logFileId: string;
  /** Why its level stands for one that the run has already; null where it must not. */
  reason: string | null;
}

/**
 * Keeps what was read from a recording: its analysis beside the file, the reading that comes of it, and its spectrum. The
 * levels are as read: correcting for background is the method's, from the background that is kept. A level that the run
 * has already is superseded only with a reason.
 * @throws ExpectedError moved_on for what isn't read or is kept already, a closed session, a run that changed; impossible
 * without a level; already_there; forbidden
 */
export async function keepRecording(
  asked: Asked,
  {
    recordingId,
    version,
    reason = null,
    now,
  }: { recordingId: string; version: number | null; reason?: string | null; now: Date },
): Promise<Kept> {
  return appDb().transaction(async (tx) => {
    const { row, session, person } = await demandRecording(tx, asked, { recordingId, lock: true, open: true });
    const result = demandRead(row);
    const newVersion = row.runId === null ? null : await stepRun(tx, asked, row.runId, version);
    const logFileId = await insertLogFile(tx, {
      ...{ fileId: row.fileId, sessionId: session.id, runId: row.runId, kind: "recording", name: row.name },
      columnsRecognised: [],
      columnsConfirmed: { ...place(row), channel: row.asked.channel },
      rowsRead: Math.round(result.report.durationS * result.report.sampleRateHz),
      refusedCount: 0,
      analysis: { purpose: row.purpose, asked: row.asked, report: result.report, calibrator: result.calibrator },
      byPerson: person.personId,
    });
    const keeping: Keeping = { row, result, session, person, logFileId, reason };
    const readingIds = await keepReading(tx, keeping);
    const spectrumId = await keepSpectrum(tx, keeping);
    await keepRecordingAs(tx, { recordingId, logFileId, keptAt: now });
    await note(tx, asked, {
      ...{ action: "recording.keep", subjectKind: "session", subjectId: session.id },
      after: { recordingId, logFileId, spectrumId, readingIds },
    });
    return { logFileId, readingIds, spectrumId, version: newVersion };
  });
}

const place = ({ positionId, phase }: RecordingRow) => ({ positionId, phase });

function demandRead({ state, keptAt, refusal, result }: RecordingRow): RecordingResult {
  if (keptAt !== null) throw new ExpectedError("moved_on", "This recording is kept already.");
  if (state === "refused") {
    throw new ExpectedError("moved_on", `The recording was refused: ${refusal?.message ?? ""} Record again.`);
  }
  if (state === "cancelled") throw new ExpectedError("moved_on", "The reading of this recording was cancelled.");
  if (!result) throw new ExpectedError("moved_on", "The recording is still being read. Keep it once that is through.");
  return result;
}

async function stepRun(tx: Handle, asked: Asked, runId: string, version: number | null): Promise<number> {
  const { run } = await demandRun(tx, asked, runId);
  demandKept(run);
  if (version === null) {
    const fields = [{ path: "version", message: "is missing: the run's as you see it" }];
    throw new ExpectedError("malformed", "A run's recording is kept at the run's version.", fields);
  }
  if (!(await changeRun(tx, { runId, version }))) throw new ExpectedError("moved_on", movedOn);
  return version + 1;
}

/** The level that was read. @throws ExpectedError impossible for digital silence */
function levelOf({ report }: RecordingResult): number {
  if (report.levelADba !== null) return report.levelADba;
  throw new ExpectedError("impossible", "The recording is digital silence: no level comes of it. Record again.", [
    { path: "levelADba", message: "can't be known" },
  ]);
}

async function keepReading(tx: Handle, keeping: Keeping): Promise<string[]> {
  if (keeping.row.purpose === "run") return keepLevel(tx, keeping);
  const { row, result, session, person, logFileId } = keeping;
  const { usedS, durationS } = result.report;
  const { calibrator } = result;
  const isCalibration = calibrator !== null;
  const quantity = isCalibration ? ("calibrator_db" as const) : ("background_dba" as const);
  const value = isCalibration ? calibrator.readDb : levelOf(result);
  checkSessionValue({ quantity, value });
  const heated = row.asked.heated ?? false;
  if (heated && durationS > 30) {
    throw new ExpectedError("malformed", "With the heater on and the fan stopped, at most 30 s are recorded.", [
      { path: "heated", message: `was ticked for a recording of ${Math.round(durationS)} s` },
    ]);
  }
  const [readingId = ""] = await insertReadings(tx, [
    {
      ...{ sessionId: session.id, runId: null, quantity, value, unit: isCalibration ? "dB" : "dB(A)" },
      ...{ positionId: row.positionId, phase: row.phase, source: "recording", logFileId, takenBy: person.personId },
      detail: isCalibration ? { ...calibrator } : { usedS, durationS },
    },
  ]);
  const check = { sessionId: session.id, positionId: row.positionId, readingId };
  if (row.phase !== null) {
    const { calibratorLevelDb } = await benchVersionOf(tx, { benchVersionId: session.benchVersionId });
    await insertCalibration(tx, { ...check, phase: row.phase, calibratorLevelDb });
  } else await insertBackground(tx, { ...check, heated, durationS });
  return [readingId];
}

async function keepLevel(tx: Handle, keeping: Keeping): Promise<string[]> {
  const { row, result, session, person, logFileId, reason } = keeping;
  const { positionId } = row;
  const runId = row.runId ?? "";
  const { usedS, durationS, correctedDba, disturbed, warnings } = result.report;
  const level = { quantity: "level_dba" as const, value: levelOf(result), positionId };
  const before =
    reason === null
      ? undefined
      : (await standingOfRun(tx, session.id, runId)).find(
          (each) => each.quantity === "level_dba" && each.positionId === positionId,
        );
  await checkRunReadings(tx, { session, runId, readings: [level], superseded: before?.id });
  return insertReadings(tx, [
    {
      ...{ sessionId: session.id, runId, ...level, unit: "dB(A)" },
      ...(before && { supersedes: before.id, reason }),
      ...{ source: "recording", logFileId, takenBy: person.personId },
      detail: {
        usedS,
        durationS,
        disturbed: disturbed.length,
        correctedDba,
        warnings: warnings.map(({ code }) => code),
      },
    },
  ]);
}

/** A background's spectrum supersedes the one before at its position; a calibration stands beside the others. */
async function keepSpectrum(tx: Handle, { row, result, session, person, logFileId }: Keeping): Promise<string> {
  const { report } = result;
  const standing = await standingSpectra(tx, { sessionIds: [session.id] });
  const before =
    row.purpose === "calibration"
      ? undefined
      : standing.findLast(
          (each) => each.purpose === row.purpose && each.runId === row.runId && each.positionId === row.positionId,
        );
  const [spectrumId = ""] = await insertSpectra(tx, [
    {
      ...{ sessionId: session.id, runId: row.runId, positionId: row.positionId, purpose: row.purpose },
      ...{ source: "recording", logFileId, readerVersion: SOUND_READER_VERSION, byPerson: person.personId },
      ...{ levelZDb: report.levelZDb, levelCDb: report.levelCDb, levelADba: report.levelADba },
      ...{ bands: report.bands, tones: report.tones, speedsRpm: report.speedsRpm, loudness: report.loudness },
      ...{ durationS: report.durationS, usedS: report.usedS },
      ...{ disturbed: report.disturbed, warnings: report.warnings },
      ...(before && { supersedes: before.id, reason: "Recorded again." }),
    },
  ]);
  return spectrumId;
}
