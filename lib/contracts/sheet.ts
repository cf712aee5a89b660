import { z } from "zod";
import { time } from "./base";
import { budgetLineSchema, budgetsSchema, notReachedWhy } from "./publication";
import { sheetSpectraSchema } from "./sheet-spectra";

/** A figure with its standard uncertainty, degrees of freedom (null: known), coverage factor and 95 % half-width. */
export const statedSchema = z.strictObject({
  value: z.number(),
  u: z.number(),
  dof: z.number().nullable(),
  k: z.number(),
  u95: z.number(),
});

export const sheetPointSchema = z.strictObject({
  setSpeed: z.number(),
  speedsRpm: z.array(z.number()),
  levelReadDba: z.number(),
  backgroundDba: z.number().nullable(),
  levelDba: statedSchema,
  upperBound: z.boolean(),
  correctionDb: z.number(),
  deltaTK: statedSchema,
  resistanceKpw: statedSchema,
  powerW: z.number(),
  runs: z.int(),
  mounts: z.int(),
  otherPositions: z.array(z.strictObject({ name: z.string(), levelDba: z.number(), u: z.number() })),
});
export type SheetPoint = z.infer<typeof sheetPointSchema>;

export const sheetAgainstSchema = z.strictObject({
  setSpeed: z.number(),
  levelDifferenceDb: statedSchema,
  levelIsBound: z.boolean(),
  deltaTDifferenceK: statedSchema,
  resistanceRatio: statedSchema,
});

export const sheetEqualNoiseSchema = z.strictObject({
  levelDba: z.number(),
  reached: z
    .strictObject({
      ratio: statedSchema,
      deltaTK: statedSchema,
      differenceK: statedSchema,
      upperBound: z.boolean(),
    })
    .nullable(),
  why: notReachedWhy.nullable(),
});

/** A place in a standing: ranks among those ranked, with the 95 % range; null where the entry isn't ranked. */
export const sheetRankSchema = z.strictObject({
  scope: z.enum(["round", "season"]),
  standing: z.int(),
  asOf: time,
  rank: z.int().nullable(),
  low: z.int().nullable(),
  high: z.int().nullable(),
  of: z.int(),
  whyNotRanked: z.string().nullable(),
});
export type SheetRank = z.infer<typeof sheetRankSchema>;

export const sheetTraitsSchema = z.strictObject({
  stages: z.int(),
  counterRotating: z.boolean(),
  spacerMm: z.number(),
  inletStack: z.string(),
  inletStackMm: z.number(),
  struts: z.int(),
  frameKey: z.string(),
  tipGapMm: z.number().nullable(),
  material: z.string(),
  printTimeMin: z.number().nullable(),
  rotors: z.array(
    z.strictObject({
      position: z.int(),
      blades: z.int(),
      hand: z.string(),
      hubDiameterMm: z.number().nullable(),
      tipDiameterMm: z.number().nullable(),
      pitchMidDeg: z.number().nullable(),
      chordMidMm: z.number().nullable(),
      solidityMid: z.number().nullable(),
      shroud: z.boolean(),
      unequalSpacing: z.boolean(),
      massG: z.number().nullable(),
    }),
  ),
  /** Where each trait that is known comes from: read off the mesh, or declared by the designer. */
  readFromMesh: z.array(z.string()),
});
export type SheetTraits = z.infer<typeof sheetTraitsSchema>;

export const sheetHistorySchema = z.strictObject({
  entryId: z.uuid(),
  letter: z.string(),
  season: z.string(),
  seasonTitle: z.string(),
  round: z.int(),
  bench: z.string(),
  headlineDba: z.number(),
  levelDifferenceDb: z.number(),
  resistancePercent: z.number(),
  equalNoisePercent: z.number().nullable(),
  baselineSerial: z.string().nullable(),
  roundRank: z.int().nullable(),
  roundOf: z.int().nullable(),
  whyNotRanked: z.string().nullable(),
});

/** A design's public page: the figures that a publication froze, with what surrounds them. */
export const sheetSchema = z.strictObject({
  number: z.int(),
  slug: z.string(),
  name: z.string(),
  summary: z.string(),
  designers: z.array(z.string()),
  entryId: z.uuid(),
  letter: z.string(),
  season: z.strictObject({ slug: z.string(), title: z.string(), number: z.int() }),
  round: z.int(),
  bench: z.strictObject({ name: z.string(), version: z.int(), microphoneDistanceMm: z.number() }),
  protocol: z.strictObject({
    name: z.string(),
    version: z.int(),
    heatLoadW: z.number(),
    backgroundGrade: z.enum(["engineering", "survey"]),
    positions: z.array(z.string()),
    setting: z.string(),
  }),
  baseline: z.strictObject({ slug: z.string(), name: z.string(), serial: z.string() }).nullable(),
  methodVersion: z.int(),
  publishedAt: time,
  firstPublishedAt: time,
  corrected: z.int(),
  publication: z.strictObject({ number: z.int(), sha256: z.string() }),
  olderPublications: z.array(z.strictObject({ number: z.int(), sha256: z.string(), publishedAt: time })),
  revision: z.strictObject({ licence: z.string(), changes: z.string(), printNotes: z.string() }),
  traits: sheetTraitsSchema,
  headlineDba: z.number(),
  equalNoise: z.array(sheetEqualNoiseSchema),
  equalCooling: z.strictObject({ levelDba: z.number(), differenceDb: statedSchema }).nullable(),
  ranks: z.strictObject({
    then: sheetRankSchema.nullable(),
    now: sheetRankSchema.nullable(),
    season: sheetRankSchema.nullable(),
  }),
  levelRangeDba: z.strictObject({ low: z.number(), lowIsBound: z.boolean(), high: z.number() }),
  points: z.array(sheetPointSchema),
  baselinePoints: z.array(sheetPointSchema),
  against: z.array(sheetAgainstSchema),
  budget: z.array(budgetLineSchema),
  /** Of the other figures; null in what was published before they were kept. */
  budgets: budgetsSchema.nullable(),
  /** Null where no spectrum was measured. */
  spectra: sheetSpectraSchema.nullable(),
  notes: z.array(z.strictObject({ code: z.string(), message: z.string() })),
  leftOutRuns: z.array(z.strictObject({ runId: z.uuid(), why: z.string() })),
  specimens: z.array(
    z.strictObject({
      number: z.int(),
      material: z.string(),
      layerHeightMm: z.number().nullable(),
      nozzleMm: z.number().nullable(),
      infillPercent: z.number().nullable(),
      walls: z.int().nullable(),
      note: z.string(),
    }),
  ),
  files: z.array(
    z.strictObject({
      /** What the file's address ends in: /api/v1/files/ATTACHMENT. */
      attachmentId: z.uuid(),
      fileId: z.uuid(),
      name: z.string(),
      role: z.string(),
      bytes: z.number(),
      sha256: z.string(),
      takenDown: z.strictObject({ at: time, reason: z.string() }).nullable(),
    }),
  ),
  history: z.array(sheetHistorySchema),
  corrections: z.array(
    z.strictObject({ number: z.int(), what: z.string(), why: z.string(), publishedAt: time, entryId: z.uuid() }),
  ),
  questions: z.array(
    z.strictObject({
      entryId: z.uuid(),
      figure: z.string(),
      body: z.string(),
      answer: z.string(),
      answeredAt: time,
      byHandle: z.string(),
    }),
  ),
});
export type Sheet = z.infer<typeof sheetSchema>;
