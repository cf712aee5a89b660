import { z } from "zod";
import { RULE_KINDS } from "@/lib/domain/scoring/rules";
import { slug, time, wholeText } from "./base";
import { protocolParts } from "./protocol";

export const ruleKind = z.enum(RULE_KINDS, { error: "is no scoring rule" });
export const seasonParams = z.strictObject({ slug });
export const roundParams = z.strictObject({ slug, number: wholeText(1, 9_999) });
export const standingQuery = z.strictObject({ rule: ruleKind.optional() });

export const roundLineSchema = z.strictObject({ number: z.int(), title: z.string(), publishedAt: time });

export const seasonLineSchema = z.strictObject({
  slug: z.string(),
  number: z.int(),
  title: z.string(),
  summary: z.string(),
  opensAt: time.nullable(),
  closesAt: time.nullable(),
  closedAt: time.nullable(),
  entries: z.int(),
  levelsDba: z.array(z.number()),
  headlineDba: z.number(),
  /** Null where bench versions of different distances count. */
  microphoneDistanceMm: z.number().nullable(),
  rounds: z.array(roundLineSchema),
});
export type SeasonLine = z.infer<typeof seasonLineSchema>;
export const seasonsSchema = z.strictObject({ items: z.array(seasonLineSchema) });

export const ruleSchema = z.strictObject({
  kind: ruleKind,
  label: z.string(),
  formula: z.string(),
  unit: z.string(),
  better: z.enum(["lower", "higher"]),
  note: z.string(),
});
export type Rule = z.infer<typeof ruleSchema>;

export const standingRowSchema = z.strictObject({
  entryId: z.uuid(),
  /** Null: the entry was withdrawn and has no sheet any more. */
  slug: z.string().nullable(),
  name: z.string(),
  letter: z.string(),
  designers: z.array(z.string()),
  round: z.int().nullable(),
  score: z.number().nullable(),
  uScore: z.number().nullable(),
  rank: z.int().nullable(),
  rankLow: z.int().nullable(),
  rankHigh: z.int().nullable(),
  pFirst: z.number().nullable(),
  /** Who shares a letter isn't told apart; null where there would be too many to tell anything. */
  letters: z.string().nullable(),
  whyNotRanked: z.string().nullable(),
  equalNoiseK: z.number().nullable(),
  /** Its rank under the rule that the season chose, where another one is looked at. */
  rankByRule: z.int().nullable(),
});
export type StandingRow = z.infer<typeof standingRowSchema>;

const mover = z.strictObject({ entryId: z.uuid(), name: z.string(), from: z.int(), to: z.int() });

export const standingSchema = z.strictObject({
  number: z.int(),
  asOf: time,
  draws: z.int(),
  seed: z.number(),
  rule: ruleSchema,
  /** The rule that holds in the season. */
  seasonRule: ruleKind,
  rows: z.array(standingRowSchema),
  /** What the plain sum would change against the season's rule; null where one of the two standings is missing. */
  plainSum: z
    .strictObject({
      both: z.int(),
      moved: z.int(),
      firstBefore: z.array(z.string()),
      firstAfter: z.array(z.string()),
      movers: z.array(mover),
      onlyPlainSum: z.int(),
    })
    .nullable(),
  rules: z.array(z.strictObject({ kind: ruleKind, label: z.string() })),
});
export type Standing = z.infer<typeof standingSchema>;

export const seasonSchema = z.strictObject({
  ...seasonLineSchema.shape,
  rules: z.string(),
  totalDepthMaxMm: z.number().nullable(),
  inletStackMaxMm: z.number().nullable(),
  frames: z.array(z.strictObject({ key: z.string(), outerMm: z.number(), boreMm: z.number(), depthMm: z.number() })),
  benches: z.array(
    z.strictObject({
      name: z.string(),
      version: z.int(),
      cooler: z.string(),
      heatSource: z.string(),
      temperatureSensors: z.string(),
      microphone: z.string(),
      calibrator: z.string(),
      microphoneDistanceMm: z.number(),
      from: time,
      reason: z.string(),
    }),
  ),
  baselines: z.array(z.strictObject({ slug: z.string(), name: z.string(), serial: z.string(), from: time })),
  protocol: z.strictObject({
    name: z.string(),
    version: z.int(),
    ...protocolParts,
    positions: z.array(z.string()),
  }),
  standing: standingSchema.nullable(),
});
export type Season = z.infer<typeof seasonSchema>;

export const roundSchema = z.strictObject({
  season: z.strictObject({ slug: z.string(), title: z.string(), number: z.int() }),
  number: z.int(),
  title: z.string(),
  publishedAt: time,
  headlineDba: z.number(),
  levelsDba: z.array(z.number()),
  microphoneDistanceMm: z.number().nullable(),
  before: z.int().nullable(),
  after: z.int().nullable(),
  standing: standingSchema.nullable(),
});
export type Round = z.infer<typeof roundSchema>;

export const roundsSchema = z.strictObject({
  items: z.array(roundLineSchema.extend({ season: z.string(), seasonTitle: z.string() })),
});
