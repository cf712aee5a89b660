import { z } from "zod";
import { id } from "./base";

const finite = z.number({ error: "is no number" });

/** Quantities of a run that a person types or pastes, with the unit in which each is stored. */
export const runQuantities = {
  level_dba: "dB(A)",
  sensor_c: "°C",
  ambient_c: "°C",
  delta_t_k: "K",
  power_w: "W",
  speed_rpm: "rpm",
} as const;

export const readingInput = z.strictObject({
  quantity: z.enum(["level_dba", "sensor_c", "ambient_c", "delta_t_k", "power_w", "speed_rpm"]),
  value: finite,
  positionId: id.nullish(),
  rotorPosition: z.int().min(1).max(4).nullish(),
  source: z.enum(["typed", "pasted"]).default("typed"),
});
export type ReadingInput = z.infer<typeof readingInput>;

export const startSession = z.strictObject({
  roundId: id,
  benchVersionId: id,
  baselineUnitId: id,
  checklist: z.record(z.string().max(60), z.boolean()),
});

export const sessionChange = z.strictObject({
  version: z.int(),
  checklist: z.record(z.string().max(60), z.boolean()).optional(),
  note: z.string().max(4000).optional(),
});

/** A reading of the session itself: calibrator before or after, background, or the air's state. */
export const sessionReading = z.discriminatedUnion("quantity", [
  z.strictObject({
    quantity: z.literal("calibrator_db"),
    positionId: id,
    phase: z.enum(["before", "after"]),
    value: finite,
  }),
  z.strictObject({
    quantity: z.literal("background_dba"),
    positionId: id,
    value: finite,
    durationS: z.number().positive().max(3600),
    heated: z.boolean().default(false),
  }),
  z.strictObject({ quantity: z.enum(["pressure_pa", "humidity_percent"]), value: finite }),
]);
export type SessionReading = z.infer<typeof sessionReading>;

/** A run: one mount at one set speed, of an entry's specimen or of the session's baseline, with its readings so far. */
export const newRun = z.strictObject({
  entryId: id.nullable(),
  /** The other unit of a bridging session; the session's own where it is left out. */
  baselineUnitId: id.nullish(),
  setSpeed: z.number().positive(),
  mountNumber: z.int().min(1).max(20),
  repeatNumber: z.int().min(1).max(20).default(1),
  readings: z.array(readingInput).max(40).default([]),
});
export type NewRun = z.infer<typeof newRun>;

/** More readings of a run. `version` is the run's as it was read: another operator's change in between is a 409. */
export const runReadings = z.strictObject({ version: z.int(), readings: z.array(readingInput).min(1).max(40) });

export const runState = z.strictObject({
  version: z.int(),
  state: z.enum(["open", "done", "held", "discarded"]),
  reason: z.string().trim().max(1000).nullish(),
});

/** Supersedes one reading by another; the old one stays. */
export const supersede = z.strictObject({ value: finite, reason: z.string().trim().min(1).max(1000) });

export const holdInput = z.strictObject({ reason: z.string().trim().min(1).max(1000) });
export const liftParams = z.strictObject({ id, holdId: id });
export const liftInput = z.strictObject({ note: z.string().trim().min(1).max(1000) });
