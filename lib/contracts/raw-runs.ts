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

/** A log or recording that readings came from. `address` is where its bytes are served, null with the reason why not. */
export const sessionFileSchema = z.strictObject({
  id: z.uuid(),
  runId: z.uuid().nullable(),
  kind: z.enum(["temperature", "level", "recording"]),
  rowsRead: z.int(),
  refusedCount: z.int(),
  bytes: z.int(),
  sha256: z.string(),
  address: z.string().nullable(),
  whyNotServed: z.string().nullable(),
  at: time,
});
export type SessionFile = z.infer<typeof sessionFileSchema>;

/** Every run of an entry and of the baseline in its session, every reading, superseded ones too, and the files behind. */
export const rawRunsSchema = z.strictObject({
  sessionId: z.uuid(),
  runs: z.array(rawRunSchema),
  readings: z.array(rawReadingSchema),
  files: z.array(sessionFileSchema),
});
export type RawRuns = z.infer<typeof rawRunsSchema>;
