import { z } from "zod";
import { id, time } from "./base";
import { controlCheck, qualificationView, unitBridge } from "./control";
import { protocolParts } from "./protocol";

/** What the screen of one session reads. Handles stand for people as they are called today; null once erased. */
const person = z.strictObject({ personId: id, handle: z.string().nullable() });

export const benchReading = z.strictObject({
  id,
  runId: id.nullable(),
  quantity: z.string(),
  positionId: id.nullable(),
  phase: z.enum(["before", "after"]).nullable(),
  rotorPosition: z.int().nullable(),
  value: z.number(),
  unit: z.string(),
  source: z.string(),
  /** Said beside a log's value: the window and how it was found, its uncertainty. */
  detail: z.record(z.string(), z.unknown()),
  supersedes: id.nullable(),
  /** Standing readings have none. */
  supersededBy: id.nullable(),
  reason: z.string().nullable(),
  takenBy: person,
  takenAt: time,
});
export type BenchReadingView = z.infer<typeof benchReading>;

export const benchRun = z.strictObject({
  id,
  /** Null for a baseline unit. */
  entryId: id.nullable(),
  baselineUnitId: id.nullable(),
  setSpeed: z.number(),
  mountNumber: z.int(),
  repeatNumber: z.int(),
  ordinal: z.int(),
  state: z.enum(["open", "done", "held", "discarded"]),
  reason: z.string().nullable(),
  version: z.int(),
  by: person,
  /** What a run that is done must have and this one lacks, in words. */
  lacks: z.array(z.string()),
});
export type BenchRunView = z.infer<typeof benchRun>;

const missingRun = z.strictObject({ setSpeed: z.number(), mount: z.int(), runs: z.int() });

export const benchSubject = z.strictObject({
  /** Null for a baseline unit. */
  entryId: id.nullable(),
  baselineUnitId: id.nullable(),
  name: z.string(),
  state: z.string().nullable(),
  rotors: z.int(),
  specimenNumber: z.int().nullable(),
  /** Why no run of it can be added now; null when one can. */
  closed: z.string().nullable(),
  sentBack: z.string().nullable(),
  missing: z.array(missingRun),
});
export type BenchSubject = z.infer<typeof benchSubject>;

export const benchHold = z.strictObject({
  id,
  code: z.string(),
  reason: z.string(),
  whatToDo: z.string(),
  raisedBy: person.nullable(),
  raisedAt: time,
  liftedBy: person.nullable(),
  liftedAt: time.nullable(),
  liftNote: z.string().nullable(),
  /** Raised by the control charts: a documented change lifts it too. */
  control: z.boolean(),
});

export const gateFinding = z.strictObject({ code: z.string(), reason: z.string(), whatToDo: z.string() });

/** Figures as far as they go: levels corrected, ΔT and resistance by set speed, and each against the baseline. */
export const livePoint = z.strictObject({
  entryId: id.nullable(),
  setSpeed: z.number(),
  mounts: z.int(),
  levelDba: z.number(),
  correctionDb: z.number(),
  atMost: z.boolean(),
  deltaTK: z.number(),
  resistanceKPerW: z.number(),
  levelDifferenceDb: z.number().nullable(),
  resistanceRatio: z.number().nullable(),
});
export type LivePoint = z.infer<typeof livePoint>;

export const logRefusal = z.strictObject({ line: z.int(), reason: z.string() });

export const benchLog = z.strictObject({
  id,
  runId: id.nullable(),
  kind: z.string(),
  name: z.string(),
  rowsRead: z.int(),
  refusedCount: z.int(),
  refused: z.array(logRefusal),
  at: time,
});

export const benchSession = z.strictObject({
  id,
  number: z.int(),
  version: z.int(),
  purpose: z.enum(["round", "qualification", "bridge"]),
  round: z.strictObject({ id, number: z.int(), seasonTitle: z.string(), state: z.string() }).nullable(),
  operator: person,
  beganAt: time,
  endedAt: time.nullable(),
  note: z.string(),
  checklist: z.record(z.string(), z.boolean()),
  bench: z.strictObject({
    name: z.string(),
    number: z.int(),
    cooler: z.string(),
    microphone: z.string(),
    calibrator: z.string(),
    calibratorLevelDb: z.number(),
    temperatureMinC: z.number(),
    temperatureMaxC: z.number(),
  }),
  baseline: z.strictObject({ name: z.string(), serial: z.string() }),
  protocol: z.strictObject(protocolParts),
  /** Of the bench; `used` by the protocol. */
  positions: z.array(
    z.strictObject({ id, name: z.string(), distanceMm: z.number(), angleDeg: z.number(), used: z.boolean() }),
  ),
  /** The baseline first, then the round's entries by name. */
  subjects: z.array(benchSubject),
  runs: z.array(benchRun),
  readings: z.array(benchReading),
  backgrounds: z.array(z.strictObject({ readingId: id, heated: z.boolean(), durationS: z.number().nullable() })),
  logs: z.array(benchLog),
  holds: z.array(benchHold),
  figures: z.array(livePoint),
  /** What would hold the session if it ended now. */
  gates: z.array(gateFinding),
  /** Where baseline and calibrator stand on their charts: so far, or as they were judged at the end. */
  control: z.array(controlCheck),
  /** Of a qualification session. */
  qualification: qualificationView.nullable(),
  /** Of a bridging session: how its own unit stands to the other. */
  bridge: z.array(unitBridge).nullable(),
  /** Why a closed session's reading may be superseded now; null when it may not. */
  sentBack: z.boolean(),
});
export type BenchSession = z.infer<typeof benchSession>;

export const sessionListItem = z.strictObject({
  id,
  number: z.int(),
  roundId: id.nullable(),
  purpose: z.string(),
  operator: person,
  beganAt: time,
  endedAt: time.nullable(),
});
export const sessionList = z.strictObject({ items: z.array(sessionListItem) });
export const sessionListQuery = z.strictObject({
  roundId: id.optional(),
  open: z.enum(["true", "false"]).optional(),
});

export const startedSession = z.strictObject({ sessionId: id });
export const endedSession = z.strictObject({ findings: z.array(gateFinding) });
export const savedRun = z.strictObject({ runId: id, version: z.int(), readingIds: z.array(id) });
export const savedReadings = z.strictObject({ version: z.int(), readingIds: z.array(id) });
export const savedVersion = z.strictObject({ version: z.int() });
export const savedReading = z.strictObject({ readingId: id });
