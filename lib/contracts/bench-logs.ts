import { z } from "zod";
import { id, wholeText } from "./base";
import { logRefusal } from "./bench-session";

/** The most bytes that a log may have. */
export const logBytesMax = 64 * 1024 * 1024;

/**
 * A log that is put to a run, and its columns as the person confirmed them, by name. `commit=no` only reads it;
 * `commit=yes` keeps the file and adds the reading, if the run is still at `version`.
 */
export const logQuery = z.strictObject({
  runId: id,
  kind: z.enum(["temperature", "level"], { error: "is neither temperature nor level" }),
  name: z.string().max(255).default("log.csv"),
  sensor: z.string().min(1).max(200).optional(),
  ambient: z.string().min(1).max(200).optional(),
  level: z.string().min(1).max(200).optional(),
  positionId: id.optional(),
  version: wholeText(1, 1_000_000).optional(),
  commit: z.enum(["no", "yes"]).default("no"),
});
export type LogQuery = z.output<typeof logQuery>;

const number = z.number().nullable();

/** What a log says, before it is kept: the same in the browser and from the server. */
export const logPreview = z.strictObject({
  rows: z.int(),
  intervalS: number,
  columns: z.array(z.strictObject({ name: z.string(), quantity: z.string().nullable(), unit: z.string().nullable() })),
  /** Names of the columns that were read. */
  chosen: z.strictObject({
    time: z.string().nullable(),
    sensor: z.string().nullable(),
    ambient: z.string().nullable(),
    level: z.string().nullable(),
  }),
  /** First kept rows in base units: s, °C, dB. */
  preview: z.array(z.strictObject({ timeS: number, sensorC: number, ambientC: number, levelDba: number })),
  /** Every refused row is counted; the first thousand are given. */
  refused: z.array(logRefusal),
  refusedCount: z.int(),
  warnings: z.array(z.strictObject({ code: z.string(), message: z.string() })),
  temperature: z
    .strictObject({
      steady: z.strictObject({ found: z.boolean(), fromS: number, toS: number, how: z.string() }),
      deltaTK: number,
      uDeltaTK: number,
      ambientC: number,
      ambientDriftK: number,
      fit: z.strictObject({ finalK: z.number(), tauS: z.number() }).nullable(),
    })
    .nullable(),
  level: z.strictObject({ laeqDba: number, sDb: number, n: z.int() }).nullable(),
  /** Why no reading comes of it, in words; null when one can be kept. */
  unusable: z.string().nullable(),
});
export type LogPreview = z.infer<typeof logPreview>;

export const logAnswer = logPreview.extend({
  sha256: z.string(),
  bytes: z.int(),
  /** What was kept: the log's row also where no reading came of it. */
  logFileId: id.nullable(),
  readingIds: z.array(id),
  version: z.int().nullable(),
});
export type LogAnswer = z.infer<typeof logAnswer>;
