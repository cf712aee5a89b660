import { rmSync } from "node:fs";
import { afterAll, beforeAll, describe, expect, it } from "vitest";
import { newRecording } from "@/lib/contracts/bench-recordings";
import { adoptEnvironment } from "@/lib/env/env";
import { analyseRecording } from "@/lib/science/acoustics/analyse-recording";
import { keepRecording } from "@/lib/server/bench/keep-recording";
import { findRecordingFile, tickListened } from "@/lib/server/bench/recording-file";
import { askRecording, cancelRecording, readRecording, readRecordings } from "@/lib/server/bench/recordings";
import { readSession } from "@/lib/server/bench/read-session";
import { addRun } from "@/lib/server/bench/runs";
import { readRecordingFile } from "@/lib/server/bench/read-recording";
import { readAsJob, sentRecording } from "../factories/bench-recordings";
import { benchRoom, speedsRpm, type BenchRoom } from "../factories/bench-room";
import { asked, later, openSession, toTheBench } from "../factories/bench-steps";
import { calibratorWav, encodings, fanWav, fullScaleDb } from "../factories/recordings";
import { setUpDatabase } from "../setup/database";
import { temporaryFolder } from "../setup/temporary-folder";

const db = setUpDatabase();
let room: BenchRoom;
let sessionId: string;
let calibrationId: string;
let backgroundId: string;
let mountNumber = 0;
const folder = temporaryFolder("bench-recordings");
afterAll(() => rmSync(folder, { recursive: true }));

const calibrator = calibratorWav();
/** In 24 bit: a quiet room comes near a step of 16 bit, whose rounding would add to it. */
const background = fanWav({ noiseDb: 30, seed: 3, encoding: { encoding: "int", bits: 24 } });
const rotors = { blades: [7], rpm: [1450] };
/** Blade passing of seven blades at 1450 rpm: m·B·n/60 (kinematics). */
const tones = [
  [169.1666667, 50],
  [338.3333333, 44],
] as const;

const read = (bytes: Uint8Array, input: Record<string, unknown>) =>
  readAsJob(db.app, room.operator, sessionId, bytes, { positionId: room.positionId, ...input });
const keep = (recordingId: string, version: number | null = null, reason: string | null = null) =>
  keepRecording(asked(room.operator), { recordingId, version, reason, now: later(8) });
const view = (recordingId: string) => readRecording(room.operator, { recordingId });

async function newRun(): Promise<string> {
  mountNumber += 1;
  const entryId = room.entries[0]?.entryId ?? "";
  const run = { sessionId, entryId, setSpeed: speedsRpm[1], mountNumber, repeatNumber: 1, readings: [] };
  return (await addRun(asked(room.operator), run)).runId;
}

beforeAll(async () => {
  adoptEnvironment({ DATA_DIR: folder });
  room = await benchRoom(db.owner);
  await toTheBench(room, room.entries[0]?.entryId ?? "");
  sessionId = await openSession(room);
  calibrationId = await read(calibrator, { purpose: "calibration", phase: "before", levelDb: 94 });
  await keep(calibrationId);
  backgroundId = await read(background, { purpose: "background", calibration: { recordingId: calibrationId } });
  await keep(backgroundId);
});

describe("a session's calibrator and background", () => {
  it("are kept as readings of the session, with files, analyses and spectra", async () => {
    const session = await readSession(room.operator, { sessionId });
    const of = (quantity: string) => session.readings.find((each) => each.quantity === quantity);
    expect(of("calibrator_db")).toMatchObject({ value: 94, source: "recording", phase: "before" });
    const { calibrator: said } = await view(calibrationId);
    // A sine of rms r at 94 dB: a signal of rms 1 has 94 − 20 lg r (definition); 16 bit rounds it by parts in 10⁵.
    expect(said?.unitLevelDb).toBeCloseTo(fullScaleDb, 3);
    expect(said?.toneHz).toBeCloseTo(1000, 0);
    const { report } = await view(backgroundId);
    expect(of("background_dba")).toMatchObject({ value: report?.levelADba, source: "recording" });
    // White noise to 24 kHz holds the share 19990/24000 between 10 Hz and 20 kHz: −0.794 dB (by hand).
    expect(report?.levelZDb).toBeCloseTo(30 - 0.794, 1);
    expect(session.backgrounds).toEqual([{ readingId: of("background_dba")?.id, heated: false, durationS: 12 }]);
    expect(await db.owner("log_file").where({ session_id: sessionId }).select("kind")).toEqual(
      Array.from({ length: 2 }, () => ({ kind: "recording" })),
    );
    const spectra = await db.owner("spectrum").where({ session_id: sessionId }).orderBy("id");
    expect(spectra.map(({ purpose }) => purpose)).toEqual(["calibration", "background"]);
    expect(spectra[1]).toMatchObject({ level_a_dba: report?.levelADba, bands: report?.bands, reader_version: 1 });
  });

  it("tell the drift: the calibrator after is read by the recording before", async () => {
    const against = { recordingId: calibrationId };
    const after = calibratorWav({ levelDb: 94.3 });
    const recordingId = await read(after, { purpose: "calibration", phase: "after", levelDb: 94, against });
    const { calibrator: said } = await view(recordingId);
    expect(said?.readDb).toBeCloseTo(94.3, 3);
    const { readingIds } = await keep(recordingId);
    const reading = await db.owner("reading").where({ id: readingIds[0] }).first();
    expect(reading).toMatchObject({ quantity: "calibrator_db", phase: "after", value: said?.readDb });
    const lone = { purpose: "calibration", phase: "after", levelDb: 94 };
    await expect(read(after, lone)).rejects.toMatchObject({ code: "malformed", fields: [{ path: "against" }] });
  });
});

describe("a run's recording", () => {
  it.each(encodings)("gives the digits of the pure reader, %s", async (_name, encoding) => {
    const bytes = fanWav({ tones, encoding, bangAtS: 5 });
    const runId = await newRun();
    const recordingId = await read(bytes, {
      ...{ purpose: "run", runId, calibration: { recordingId: calibrationId }, backgroundId, rotors },
    });
    const { report, state, doneBytes, ofBytes } = await view(recordingId);
    const alone = await analyseRecording(bytes, {
      calibration: { recording: calibrator, levelDb: 94 },
      background,
      rotors,
    });
    expect(state).toBe("read");
    expect(doneBytes).toBe(ofBytes);
    expect(report).toEqual(JSON.parse(JSON.stringify(alone.report)));
    expect(report?.disturbed).toEqual([{ fromS: 5, toS: 6 }]);
    expect(report?.tones[0]).toMatchObject({ match: { kind: "blade-passing", rotor: 1, m1: 1 } });
    expect(report?.tones[0]?.levelDb).toBeCloseTo(50, 1);
    const { readingIds, spectrumId, version } = await keep(recordingId, 1);
    expect(version).toBe(2);
    const reading = await db.owner("reading").where({ id: readingIds[0] }).first();
    expect(reading).toMatchObject({ quantity: "level_dba", value: report?.levelADba, source: "recording" });
    expect(await db.owner("spectrum").where({ id: spectrumId }).first()).toMatchObject({
      ...{ run_id: runId, tones: report?.tones, used_s: 11, disturbed: report?.disturbed },
    });
  });

  it("is read from the channel that was chosen, and from the first with a word where nobody chose", async () => {
    const bytes = fanWav({ tones, stereo: true });
    const order = { purpose: "run", runId: await newRun(), calibration: { fullScaleDb } };
    const first = (await view(await read(bytes, order))).report;
    const second = (await view(await read(bytes, { ...order, channel: 2 }))).report;
    expect(first?.warnings.map(({ code }) => code)).toContain("channel-assumed");
    // The other channel holds noise of 60 dB, of which 19990/24000 count: 59.2 dB (by hand).
    expect(second?.levelZDb).toBeCloseTo(59.2, 1);
    const none = await view(await read(bytes, { ...order, channel: 3 }));
    expect(none).toMatchObject({ state: "refused", refusal: { code: "channel-missing" }, report: null });
    await expect(keep(none.id, 1)).rejects.toMatchObject({ code: "moved_on" });
  });

  it("is kept once, at the run's version, and supersedes another level of the run only with a reason", async () => {
    const runId = await newRun();
    const order = { purpose: "run", runId, calibration: { recordingId: calibrationId } };
    const [one, two] = [await read(fanWav({ tones }), order), await read(fanWav({ tones, seed: 8 }), order)];
    await expect(keep(one)).rejects.toMatchObject({ code: "malformed", fields: [{ path: "version" }] });
    await expect(keep(one, 7)).rejects.toMatchObject({ code: "moved_on" });
    const [first] = (await keep(one, 1)).readingIds;
    await expect(keep(one, 2)).rejects.toMatchObject({ code: "moved_on" });
    await expect(keep(two, 2)).rejects.toMatchObject({ code: "already_there" });
    expect(await db.owner("spectrum").where({ run_id: runId })).toHaveLength(1);
    const [second] = (await keep(two, 2, "A lorry passed.")).readingIds;
    expect(await db.owner("reading").where({ id: second }).first()).toMatchObject({
      ...{ supersedes: first, reason: "A lorry passed.", source: "recording" },
    });
    expect(await db.owner("spectrum").where({ run_id: runId })).toHaveLength(2);
  });

  it("gives no level where it is digital silence, and is refused where it is clipped or too short", async () => {
    const order = { purpose: "run", runId: await newRun(), calibration: { fullScaleDb } };
    const silent = await read(fanWav({ noiseDb: -Infinity }), order);
    expect((await view(silent)).report).toMatchObject({ levelADba: null, loudness: null });
    await expect(keep(silent, 1)).rejects.toMatchObject({ code: "impossible" });
    const clipped = await view(await read(fanWav({ noiseDb: 124, tones: [[500, 130]] }), order));
    expect(clipped).toMatchObject({ state: "refused", refusal: { code: "clipped" } });
    const short = await view(await read(fanWav({ seconds: 0.5 }), order));
    expect(short).toMatchObject({ state: "refused", refusal: { code: "too-short" } });
  });

  it("is asked for with what is there: own file, position, kept calibration, matching speeds", async () => {
    const runId = await newRun();
    const uploadId = await sentRecording(db.app, room.operator, sessionId, fanWav());
    const { positionId } = room;
    const order = { purpose: "run", uploadId, runId, positionId, calibration: { fullScaleDb } };
    const ask = (change: Record<string, unknown>, by = room.operator) =>
      askRecording(asked(by), { sessionId, ...newRecording.parse({ ...order, ...change }) });
    await expect(ask({}, room.second)).rejects.toMatchObject({ code: "not_found" });
    await expect(ask({}, room.designer)).rejects.toMatchObject({ code: "forbidden" });
    await expect(ask({ positionId: runId })).rejects.toMatchObject({ fields: [{ path: "positionId" }] });
    const missing = { calibration: { recordingId: backgroundId } };
    await expect(ask(missing)).rejects.toMatchObject({ code: "malformed", fields: [{ path: "calibration" }] });
    await expect(ask({ backgroundId: calibrationId })).rejects.toMatchObject({ fields: [{ path: "backgroundId" }] });
    const odd = { rotors: { blades: [7, 9], rpm: [900] } };
    await expect(ask(odd)).rejects.toMatchObject({ fields: [{ path: "rotors.rpm" }] });
  });

  it("can be cancelled before it is read, and stays so", async () => {
    const uploadId = await sentRecording(db.app, room.operator, sessionId, fanWav({ seed: 21 }));
    const calibration = { fullScaleDb };
    const order = newRecording.parse({ purpose: "background", uploadId, positionId: room.positionId, calibration });
    const { recordingId } = await askRecording(asked(room.operator), { sessionId, ...order });
    await cancelRecording(asked(room.operator), { recordingId, now: later(9) });
    await readRecordingFile(recordingId, () => later(9));
    expect((await view(recordingId)).state).toBe("cancelled");
    const again = cancelRecording(asked(room.operator), { recordingId, now: later(9) });
    await expect(again).rejects.toMatchObject({ code: "moved_on" });
  });
});

describe("a recording's bytes", () => {
  it("are served only once somebody listened to it and heard no voices", async () => {
    const recordingId = backgroundId;
    await expect(findRecordingFile(room.host, { recordingId })).rejects.toMatchObject({ code: "moved_on" });
    await tickListened(asked(room.second), { recordingId, now: later(10) });
    await tickListened(asked(room.operator), { recordingId, now: later(11) });
    expect((await findRecordingFile(room.host, { recordingId })).bytes).toBe(background.length);
    const { items } = await readRecordings(room.operator, { sessionId });
    const said = items.find(({ id }) => id === recordingId);
    expect(said).toMatchObject({ listenedBy: { personId: room.second.personId }, listenedAt: later(10).toISOString() });
    await expect(findRecordingFile(room.designer, { recordingId })).rejects.toMatchObject({ code: "forbidden" });
    const change = db
      .app("recording_listened")
      .where({ recording_id: recordingId })
      .update({ at: later(12) });
    await expect(change).rejects.toThrow();
  });
});
