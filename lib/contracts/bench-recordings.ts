import { z } from "zod";
import { id, time } from "./base";
import { calibratorReport, soundReport } from "./sound-report";

const channel = z.int("is no whole number").min(1, "counts from 1").max(64, "is more than 64").nullable().default(null);

/** What the level is told by: a calibrator recording of this session that is kept, or the level in dB of an rms of 1. */
const calibration = z.union([
  z.strictObject({ recordingId: id }),
  z.strictObject({ fullScaleDb: z.number().min(-100, "is under -100 dB").max(250, "is over 250 dB") }),
]);

const rotors = z.strictObject({
  blades: z.array(z.int().min(1).max(200)).min(1).max(2),
  rpm: z.array(z.number().positive().max(100_000)).min(1).max(2),
  rotation: z.enum(["counter", "co"]).optional(),
  struts: z.int().min(0).max(200).optional(),
});

const base = { uploadId: id, positionId: id, channel };

/** Asks for a recording to be read, once its bytes are all there: a file of one's own, sent for this session. */
export const newRecording = z.discriminatedUnion("purpose", [
  z.strictObject({
    purpose: z.literal("calibration"),
    ...base,
    phase: z.enum(["before", "after"]),
    levelDb: z.number().min(60, "is under 60 dB").max(130, "is over 130 dB"),
    /** What it is read by; null for the first, which tells itself. */
    against: calibration.nullable().default(null),
  }),
  z.strictObject({ purpose: z.literal("background"), ...base, calibration, heated: z.boolean().default(false) }),
  z.strictObject({
    purpose: z.literal("run"),
    ...base,
    runId: id,
    calibration,
    /** A background recording of this session that is kept. */
    backgroundId: id.nullable().default(null),
    rotors: rotors.nullable().default(null),
  }),
]);
export type NewRecording = z.output<typeof newRecording>;

export const askedRecording = z.strictObject({ recordingId: id });

const said = z.array(z.strictObject({ code: z.string(), message: z.string() }));
const power = z.number();

/** What later recordings read this one as: not rounded, so that a preview gives the server's digits. */
export const givenRead = z.strictObject({
  calibrator: z.strictObject({ unitLevelDb: z.number(), warnings: said }).nullable(),
  background: z
    .strictObject({
      powers: z.strictObject({ z: power, c: power, a: power, bands: z.array(power.nullable()) }).nullable(),
      warnings: said,
    })
    .nullable(),
});

/** One recording of a session: how far its reading is, what it says, whether it is kept and was listened to. */
export const benchRecording = z.strictObject({
  id,
  purpose: z.enum(["run", "background", "calibration"]),
  runId: id.nullable(),
  positionId: id,
  phase: z.enum(["before", "after"]).nullable(),
  name: z.string(),
  bytes: z.int(),
  sha256: z.string(),
  channel: z.int().nullable(),
  state: z.enum(["waiting", "reading", "read", "refused", "cancelled"]),
  /** Bytes gone through, of those that will be: a file is gone through more than once. */
  doneBytes: z.int(),
  ofBytes: z.int(),
  refusal: z.strictObject({ code: z.string(), message: z.string(), at: z.string().nullable() }).nullable(),
  report: soundReport.nullable(),
  calibrator: calibratorReport.nullable(),
  given: givenRead.nullable(),
  logFileId: id.nullable(),
  keptAt: time.nullable(),
  listenedBy: z.strictObject({ personId: id, handle: z.string().nullable() }).nullable(),
  listenedAt: time.nullable(),
  createdAt: time,
});
export type BenchRecording = z.infer<typeof benchRecording>;

/** What is known of a subject's rotors, which tones are predicted from. */
export const recordingSubject = z.strictObject({
  entryId: id,
  /** Blades, rotor 1 first. */
  blades: z.array(z.int()),
  rotation: z.enum(["counter", "co"]).nullable(),
  struts: z.int(),
  inletStackMm: z.number(),
});
export type RecordingSubject = z.infer<typeof recordingSubject>;

export const benchRecordings = z.strictObject({
  items: z.array(benchRecording),
  subjects: z.array(recordingSubject),
});
export type BenchRecordings = z.infer<typeof benchRecordings>;

/** Keeps what was read, as readings; of a run, if it is still at `version`. With `reason` it may supersede its level. */
export const keepRecording = z.strictObject({
  version: z.int().nullable().default(null),
  reason: z.string().trim().min(1).max(1000).nullable().default(null),
});
export const keptRecording = z.strictObject({
  logFileId: id,
  readingIds: z.array(id),
  spectrumId: id,
  version: z.int().nullable(),
});

/** Who ticks this listened to the whole recording and heard no voices. */
export const listenedRecording = z.strictObject({ noVoices: z.literal(true, "is not ticked") });
