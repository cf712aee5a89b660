import { z } from "zod";
import { slug, time } from "./base";
import { breakKinds, controlCheck } from "./control";
import { sheetPointSchema, statedSchema } from "./sheet";

export const baselineParams = z.strictObject({ slug });

const quantity = z.enum(["level_dba", "thermal_resistance_kpw"]);

export const baselineUnitSchema = z.strictObject({
  serial: z.string(),
  inServiceFrom: time,
  retiredAt: time.nullable(),
  retiredReason: z.string().nullable(),
});
export type BaselineUnit = z.infer<typeof baselineUnitSchema>;

export const baselineLineSchema = z.strictObject({
  slug: z.string(),
  name: z.string(),
  description: z.string(),
  blades: z.int().nullable(),
  units: z.array(baselineUnitSchema),
});
export type BaselineLine = z.infer<typeof baselineLineSchema>;
export const baselinesSchema = z.strictObject({ items: z.array(baselineLineSchema) });

/** What a published session read of its baseline, set speed by set speed. */
export const baselineSessionSchema = z.strictObject({
  serial: z.string(),
  session: z.int(),
  beganAt: time,
  season: z.string(),
  seasonTitle: z.string(),
  round: z.int(),
  bench: z.string(),
  microphoneDistanceMm: z.number(),
  points: z.array(sheetPointSchema),
});
export type BaselineSession = z.infer<typeof baselineSessionSchema>;

export const agreedValueSchema = z.strictObject({
  serial: z.string(),
  bench: z.string(),
  microphoneDistanceMm: z.number(),
  quantity,
  setSpeed: z.number(),
  value: z.number(),
  /** Standard uncertainty. */
  u: z.number(),
  from: time,
  reason: z.string(),
  /** Numbers of the sessions that it comes from. */
  sessions: z.array(z.int()),
});
export type AgreedValue = z.infer<typeof agreedValueSchema>;

/** What a ratio to the unit `from` is multiplied by to be one to `to` (or the difference), from sessions that ran both. */
export const bridgeSchema = z.strictObject({
  from: z.string(),
  to: z.string(),
  bench: z.string(),
  microphoneDistanceMm: z.number(),
  quantity,
  setSpeed: z.number().nullable(),
  levelDba: z.number().nullable(),
  kind: z.enum(["ratio", "difference"]),
  figure: statedSchema,
  sessions: z.int(),
});
export type BaselineBridge = z.infer<typeof bridgeSchema>;

const chartOf = {
  serial: z.string(),
  bench: z.string(),
  quantity: z.enum(["level_dba", "thermal_resistance_kpw", "calibrator_db"]),
  setSpeed: z.number().nullable(),
};

/** A session on a control chart, as it was judged; figures in the unit of the quantity. */
export const baselineCheckSchema = z.strictObject({
  ...controlCheck.shape,
  ...chartOf,
  microphoneDistanceMm: z.number(),
  session: z.int(),
  purpose: z.enum(["round", "qualification", "bridge"]),
  at: time,
  /** Why the charts held the session and why it went on; null where they didn't. */
  holdReason: z.string().nullable(),
  liftNote: z.string().nullable(),
  published: z.boolean(),
});
export type BaselineCheck = z.infer<typeof baselineCheckSchema>;

/** A stretch between documented changes (`trial` true), or limits that froze within it (`trial` false). */
export const controlPhaseSchema = z.strictObject({
  ...chartOf,
  from: time,
  reason: z.string(),
  kind: z.enum(breakKinds).nullable(),
  trial: z.boolean(),
  centre: z.number().nullable(),
  sigma: z.number().nullable(),
});
export type ControlPhase = z.infer<typeof controlPhaseSchema>;

export const baselineSchema = z.strictObject({
  ...baselineLineSchema.shape,
  agreed: z.array(agreedValueSchema),
  bridges: z.array(bridgeSchema),
  checks: z.array(baselineCheckSchema),
  phases: z.array(controlPhaseSchema),
  sessions: z.array(baselineSessionSchema),
});
export type Baseline = z.infer<typeof baselineSchema>;
