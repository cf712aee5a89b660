import { z } from "zod";
import { slug, time } from "./base";

export const sheetQuery = z.strictObject({ entry: z.uuid({ error: "is no id" }).optional() });
export const sheetParams = z.strictObject({ slug });

export const rawReadingSchema = z.strictObject({
  id: z.uuid(),
  runId: z.uuid().nullable(),
  quantity: z.string(),
  position: z.string().nullable(),
  phase: z.string().nullable(),
  rotorPosition: z.int().nullable(),
  value: z.number(),
  unit: z.string(),
  source: z.string(),
  supersedes: z.uuid().nullable(),
  supersededBy: z.uuid().nullable(),
  reason: z.string().nullable(),
  takenAt: time,
});
export type RawReading = z.infer<typeof rawReadingSchema>;

export const rawRunSchema = z.strictObject({
  runId: z.uuid(),
  subject: z.enum(["entry", "baseline"]),
  setSpeed: z.number(),
  mountNumber: z.int(),
  repeatNumber: z.int(),
  ordinal: z.int(),
  state: z.string(),
  reason: z.string().nullable(),
  beganAt: time,
});
export type RawRun = z.infer<typeof rawRunSchema>;

/** Every run of an entry and of the baseline in its session, and every reading, superseded ones too. */
export const rawRunsSchema = z.strictObject({
  sessionId: z.uuid(),
  runs: z.array(rawRunSchema),
  readings: z.array(rawReadingSchema),
});
export type RawRuns = z.infer<typeof rawRunsSchema>;
