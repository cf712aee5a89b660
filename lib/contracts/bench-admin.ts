import { z } from "zod";
import { RULE_KINDS } from "@/lib/domain/scoring/rules";
import { id, slug, time } from "./base";

const words = (most: number) => z.string().trim().min(1, "is missing").max(most);
const text = (most: number) => z.string().trim().max(most).default("");

export const newBench = z.strictObject({ slug, name: words(120), description: text(2000) });

export const newBenchVersion = z.strictObject({
  cooler: words(300),
  heatSource: words(300),
  temperatureSensors: words(300),
  temperatureMinC: z.number().min(-100).max(100).default(-40),
  temperatureMaxC: z.number().min(0).max(400).default(150),
  microphone: words(300),
  calibrator: words(300),
  calibratorLevelDb: z.number().min(60).max(130).default(94),
  microphoneDistanceMm: z.number().positive().max(5000).default(100),
  changeReason: words(1000),
});
export const newPosition = z.strictObject({
  name: words(60),
  distanceMm: z.number().positive().max(5000),
  angleDeg: z.number().min(-180).max(180),
});
/** A standard uncertainty in dB or K; relative for a shared gain. */
export const newBudgetPart = z.strictObject({
  quantity: z.enum(["level_dba", "delta_t_k"]),
  name: words(120),
  u: z.number().min(0).max(100),
  unit: z.enum(["dB", "K", "relative"]),
  evaluation: z.enum(["A", "B"]),
  distribution: z.enum(["normal", "rectangular", "triangular", "arcsine", "student"]),
  dof: z.number().positive().nullish(),
  source: words(500),
  kind: z.enum(["own_run", "own_mount", "shared_offset", "shared_gain"]),
});

/** A budget version, with its parts where they are written down at once. */
export const newBudget = z.strictObject({ note: text(1000), parts: z.array(newBudgetPart).max(60).default([]) });

export const newProtocol = z.strictObject({ slug, name: words(120) });
export const newProtocolVersion = z.strictObject({
  heatLoadW: z.number().positive().max(2000),
  setting: z.enum(["rpm", "drive_percent"]).default("rpm"),
  setSpeeds: z.array(z.number().positive().max(60_000)).min(1, "names no set speed").max(24),
  positions: z.array(words(60)).min(1).max(8).default(["on axis"]),
  mounts: z.int().min(1).max(20),
  runsPerMount: z.int().min(1).max(20),
  backgroundGrade: z.enum(["engineering", "survey"]),
  epsilonK: z.number().positive().max(5).default(0.1),
  ambientMinC: z.number().min(-20).max(60).default(18),
  ambientMaxC: z.number().min(-20).max(60).default(28),
  minutesPerRun: z.number().positive().max(600).default(12),
  minutesPerMount: z.number().min(0).max(600).default(15),
});

export const newBaseline = z.strictObject({
  slug,
  name: words(120),
  description: text(2000),
  blades: z.int().min(2).max(60).nullish(),
});
export const newBaselineUnit = z.strictObject({ serial: words(60), inServiceFrom: time });

const part = newBudgetPart.extend({ id, dof: z.number().nullable() });
const budget = z.strictObject({
  id,
  number: z.int(),
  note: z.string(),
  frozenAt: time.nullable(),
  parts: z.array(part),
});
const benchVersion = z.strictObject({
  id,
  number: z.int(),
  cooler: z.string(),
  heatSource: z.string(),
  temperatureSensors: z.string(),
  microphone: z.string(),
  calibrator: z.string(),
  microphoneDistanceMm: z.number(),
  validFrom: time,
  changeReason: z.string(),
  positions: z.array(z.strictObject({ id, name: z.string(), distanceMm: z.number(), angleDeg: z.number() })),
  budgets: z.array(budget),
});
const protocolVersion = z.strictObject({
  id,
  number: z.int(),
  heatLoadW: z.number(),
  setting: z.string(),
  setSpeeds: z.array(z.number()),
  positions: z.array(z.string()),
  mounts: z.int(),
  runsPerMount: z.int(),
  backgroundGrade: z.string(),
  minutesPerRun: z.number(),
  minutesPerMount: z.number(),
  frozenAt: time.nullable(),
});

/** Everything that a season is set up from. */
export const benchSetup = z.strictObject({
  benches: z.array(
    z.strictObject({
      id,
      slug: z.string(),
      name: z.string(),
      description: z.string(),
      versions: z.array(benchVersion),
    }),
  ),
  protocols: z.array(z.strictObject({ id, slug: z.string(), name: z.string(), versions: z.array(protocolVersion) })),
  baselines: z.array(
    z.strictObject({
      id,
      slug: z.string(),
      name: z.string(),
      units: z.array(z.strictObject({ id, serial: z.string(), inServiceFrom: time, retiredAt: time.nullable() })),
    }),
  ),
  rules: z.array(z.strictObject({ id, name: z.string(), number: z.int(), kind: z.enum(RULE_KINDS) })),
  frames: z.array(z.strictObject({ id, key: z.string() })),
});
export type BenchSetup = z.infer<typeof benchSetup>;
