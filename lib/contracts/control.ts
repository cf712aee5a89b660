import { z } from "zod";
import { id, time } from "./base";

export const breakKinds = ["unit", "bench", "service", "other"] as const;

/** A change at a bench that the host documents: from a session on, the charts begin a new phase. */
export const documentedChange = z.strictObject({
  fromSessionId: id,
  kind: z.enum(breakKinds),
  reason: z.string().trim().min(1, "is missing").max(1000),
  /** Counts for every unit on the bench version, as a new microphone does; else for the session's own. */
  allUnits: z.boolean().default(true),
});
export type DocumentedChange = z.output<typeof documentedChange>;
export const documentedAnswer = z.strictObject({ breakId: id, released: z.array(z.int()) });

const quantity = z.enum(["level_dba", "thermal_resistance_kpw", "calibrator_db"]);

/** Where a session stands on one of its charts; figures in the unit of the quantity. */
export const controlCheck = z.strictObject({
  quantity,
  setSpeed: z.number().nullable(),
  kind: z.enum(["none", "trial", "frozen"]),
  value: z.number(),
  before: z.int(),
  centre: z.number().nullable(),
  sigma: z.number().nullable(),
  lower: z.number().nullable(),
  upper: z.number().nullable(),
  movingRange: z.number().nullable(),
  rangeUpper: z.number().nullable(),
  ewma: z.number().nullable(),
  ewmaLower: z.number().nullable(),
  ewmaUpper: z.number().nullable(),
  out: z.array(z.string()),
});
export type ControlCheck = z.infer<typeof controlCheck>;

const repeatability = z.strictObject({
  value: z.number(),
  sBetween: z.number().nullable(),
  sWithin: z.number().nullable(),
  u: z.number(),
  dof: z.number().nullable(),
});
export const qualificationView = z.strictObject({
  mounts: z.int(),
  points: z.array(
    z.strictObject({
      setSpeed: z.number(),
      mounts: z.int(),
      runs: z.int(),
      levelIsBound: z.boolean(),
      levelDba: repeatability,
      resistanceKpw: repeatability,
    }),
  ),
  /** What it still lacks, in words. */
  lacks: z.array(z.string()),
  /** Its agreed values are written down. */
  settled: z.boolean(),
});
export type QualificationView = z.infer<typeof qualificationView>;

export const unitBridge = z.strictObject({
  quantity: z.enum(["level_dba", "thermal_resistance_kpw"]),
  setSpeed: z.number().nullable(),
  levelDba: z.number().nullable(),
  ratio: z.number().nullable(),
  difference: z.number().nullable(),
  u: z.number(),
  dof: z.number().nullable(),
});
export type UnitBridgeView = z.infer<typeof unitBridge>;

/** A session without a round: to qualify a bench, or to bridge one baseline unit to another. */
export const startBenchSession = z
  .strictObject({
    purpose: z.enum(["qualification", "bridge"]),
    baselineUnitId: id,
    bridgeUnitId: id.nullish(),
    protocolVersionId: id,
    budgetVersionId: id,
    checklist: z.record(z.string().max(60), z.boolean()),
  })
  .refine(({ purpose, bridgeUnitId }) => (purpose === "bridge") === (typeof bridgeUnitId === "string"), {
    path: ["bridgeUnitId"],
    message: "is given for a bridge, and for nothing else",
  });
export type StartBenchSession = z.output<typeof startBenchSession>;

/** What the host sees of a bench version: qualification, sessions, documented changes. */
export const benchControl = z.strictObject({
  bench: z.string(),
  /** Set speeds at which it is qualified. */
  qualifiedSpeeds: z.array(z.number()),
  sessions: z.array(
    z.strictObject({
      id,
      number: z.int(),
      purpose: z.enum(["round", "qualification", "bridge"]),
      serial: z.string(),
      beganAt: time,
      endedAt: time.nullable(),
      /** Holds that stand. */
      held: z.int(),
      /** Its baseline or calibrator was out of control. */
      out: z.boolean(),
    }),
  ),
  changes: z.array(
    z.strictObject({
      from: time,
      kind: z.enum(breakKinds),
      reason: z.string(),
      /** Null for every unit on the bench version. */
      serial: z.string().nullable(),
      by: z.string().nullable(),
    }),
  ),
  checklist: z.array(z.strictObject({ key: z.string(), words: z.string() })),
});
export type BenchControl = z.infer<typeof benchControl>;
