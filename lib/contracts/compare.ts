import { z } from "zod";
import { setSpeedSpectrumSchema } from "./publication";

/** Most that can be laid over a baseline at once: more lines than that nobody tells apart. */
export const compareMost = 4;

const plainNumber = z
  .string()
  .regex(/^-?\d{1,3}(\.\d{1,6})?$/, "is no plain number")
  .transform(Number);

/** `?entries=heronwing.b.season-4,slow-mill.a.season-4&level=46`; ids are taken as well as names. */
export const compareQuery = z.strictObject({
  entries: z
    .union([z.string(), z.array(z.string())], { error: "names one to four entries, with commas between" })
    .transform((given) => (Array.isArray(given) ? given : [given]).flatMap((list) => list.split(",")))
    .transform((list) => [...new Set(list.map((each) => each.trim()).filter(Boolean))])
    .refine((list) => list.length >= 1, { error: "names no entry" })
    .refine((list) => list.length <= compareMost, { error: `names more than ${compareMost} entries` })
    .refine((list) => list.every((each) => each.length <= 200), { error: "has a name that is too long" }),
  level: plainNumber.optional(),
});
export type CompareQuery = z.infer<typeof compareQuery>;

/** The page's address: names in the order in which they are drawn, and the level where one was chosen. */
export function compareAddress(tokens: readonly string[], levelDba?: number): string {
  const level = levelDba === undefined ? "" : `&level=${levelDba}`;
  return tokens.length === 0 ? "/compare" : `/compare?entries=${tokens.join(",")}${level}`;
}

/** A value with the half-width of its 95 % coverage interval. */
const estimate = z.strictObject({ value: z.number(), half95: z.number() });
/** `p` of no difference, two-sided; a tie may have a small one where the lead is within a bound's correction. */
const contrast = estimate.extend({ tie: z.boolean(), p: z.number() });

export const comparedPointSchema = z.strictObject({
  setSpeedRpm: z.number(),
  levelDba: estimate.extend({ upperBound: z.boolean() }),
  deltaTK: estimate,
  powerW: z.number(),
  resistanceKPerW: estimate,
  mounts: z.int(),
});

export const comparedTraitSchema = z.strictObject({
  key: z.string(),
  label: z.string(),
  unit: z.string().nullable(),
  /** In the order of the entries; null where it was not declared. */
  values: z.array(z.string().nullable()),
  baseline: z.string().nullable(),
  differs: z.boolean(),
});
export type ComparedTrait = z.infer<typeof comparedTraitSchema>;

export const comparedRankSchema = z.strictObject({
  rule: z.string(),
  /** "round" or "season". */
  of: z.enum(["round", "season"]),
  rank: z.int().nullable(),
  rankLow: z.int().nullable(),
  rankHigh: z.int().nullable(),
  ranked: z.int(),
  whyNotRanked: z.string().nullable(),
});
export type ComparedRank = z.infer<typeof comparedRankSchema>;

export const drawnTraitsSchema = z.strictObject({
  rotors: z.array(
    z.strictObject({
      blades: z.int(),
      hand: z.string(),
      hubDiameterMm: z.number().nullable(),
      tipDiameterMm: z.number().nullable(),
      axialDepthMm: z.number().nullable(),
      pitchMidDeg: z.number().nullable(),
      chordMidMm: z.number().nullable(),
      shroud: z.boolean(),
    }),
  ),
  spacerMm: z.number(),
  inletStackMm: z.number(),
});
export type DrawnTraitsAnswer = z.infer<typeof drawnTraitsSchema>;

export const comparedHeadSchema = z.strictObject({
  token: z.string(),
  entryId: z.uuid(),
  slug: z.string(),
  name: z.string(),
  letter: z.string(),
  designers: z.array(z.string()),
  seasonSlug: z.string(),
  seasonTitle: z.string(),
  roundNumber: z.int(),
  headlineDba: z.number(),
  levelsDba: z.array(z.number()),
  bench: z.string(),
  distanceMm: z.number(),
  sessionId: z.uuid(),
  baselineUnit: z.string(),
  /** Where the session ran another baseline unit than that of the first entry: what carries its ratio over. */
  bridge: z
    .strictObject({ fromUnit: z.uuid(), ratio: z.number(), u: z.number(), dof: z.number().nullable() })
    .nullable(),
  methodVersion: z.int(),
  corrections: z.int(),
  printNotes: z.string(),
  licence: z.string(),
  /** What a drawing from the traits is made of. */
  drawnFrom: drawnTraitsSchema,
  ranks: z.array(comparedRankSchema),
  /** Rotors in all, for naming tones. */
  stages: z.int(),
  /** At the protocol's positions, with the own session's baseline; null where none was measured. */
  spectra: z
    .strictObject({ entry: z.array(setSpeedSpectrumSchema), baseline: z.array(setSpeedSpectrumSchema) })
    .nullable(),
});
export type ComparedHead = z.infer<typeof comparedHeadSchema>;

export const comparabilitySchema = z.enum(["same-axis", "ratios", "not-comparable"]);

/** `GET /api/v1/compare`. What may not stand side by side is absent: see `comparability`. */
export const compareAnswerSchema = z.strictObject({
  comparability: comparabilitySchema,
  /** How many of the entries asked for are not public or not there. */
  missing: z.int(),
  entries: z.array(
    comparedHeadSchema.extend({
      points: z.array(comparedPointSchema),
      baselinePoints: z.array(comparedPointSchema),
      atLevel: z.strictObject({
        levelDba: z.number(),
        why: z.string().optional(),
        ratioPercent: contrast.optional(),
        deltaTK: estimate.optional(),
        differenceK: contrast.optional(),
        upperBound: z.boolean().optional(),
        coolingDb: contrast.optional(),
        baselineDeltaTK: estimate.optional(),
      }),
    }),
  ),
  pairs: z.array(
    z.strictObject({
      a: z.string(),
      b: z.string(),
      percent: contrast.optional(),
      deltaTK: contrast.optional(),
      coolingDb: contrast.optional(),
    }),
  ),
  traits: z.array(comparedTraitSchema),
});
export type CompareAnswer = z.infer<typeof compareAnswerSchema>;
