import { z } from "zod";
import { toneSchema } from "./tone";

/** A figure with its standard uncertainty u and degrees of freedom (null: taken as known exactly). */
export const figureSchema = z.strictObject({
  value: z.number(),
  u: z.number().min(0),
  dof: z.number().positive().nullable(),
});
export type Figure = z.infer<typeof figureSchema>;

/** One kind of part of a figure's uncertainty: size in the figure's unit, share of the variance, what cancels. */
export const budgetLineSchema = z.strictObject({
  quantity: z.enum(["level", "delta_t", "ratio"]),
  kind: z.enum(["own_run", "own_mount", "shared_offset", "shared_gain", "bridge"]),
  of: z.enum(["entry", "baseline", "session"]),
  u: z.number().min(0),
  share: z.number().min(0).max(1),
  dof: z.number().positive().nullable(),
  cancels: z.enum(["fully", "partly", "no"]),
  parts: z.array(
    z.strictObject({ name: z.string(), evaluation: z.enum(["A", "B"]), u: z.number(), source: z.string() }),
  ),
});
export type BudgetLine = z.infer<typeof budgetLineSchema>;

/** A part of the bench's budget as it stood, in its own unit (dB or K, relative for a gain). */
export const budgetPartSchema = z.strictObject({
  quantity: z.enum(["level", "delta_t"]),
  kind: z.enum(["own_run", "own_mount", "shared_offset", "shared_gain"]),
  name: z.string(),
  evaluation: z.enum(["A", "B"]),
  u: z.number(),
  dof: z.number().positive().nullable(),
  source: z.string(),
});

/** Figures beside the headline difference whose budget is kept; at a set speed but for the one at equal cooling. */
export const budgetedFigures = [
  "equal-cooling",
  "level",
  "delta-t",
  "level-difference",
  "delta-t-difference",
  "resistance-ratio",
] as const;

/** Budgets of the other figures; lines name their parts by quantity and kind, so that each part stands once. */
export const budgetsSchema = z.strictObject({
  parts: z.array(budgetPartSchema),
  figures: z.array(
    z.strictObject({
      figure: z.enum(budgetedFigures),
      setSpeed: z.number().nullable(),
      lines: z.array(budgetLineSchema.omit({ parts: true })),
    }),
  ),
});
export type Budgets = z.infer<typeof budgetsSchema>;

/** One set speed of a subject: levels in dB(A) at the bench's microphone, ΔT in K, resistance in K/W. */
export const snapshotPointSchema = z.strictObject({
  setSpeed: z.number(),
  speedsRpm: z.array(z.number()),
  levelReadDba: z.number(),
  backgroundDba: z.number().nullable(),
  level: figureSchema.extend({ upperBound: z.boolean(), correctionDb: z.number() }),
  deltaT: figureSchema,
  resistance: figureSchema,
  powerW: z.number(),
  runs: z.number().int(),
  mounts: z.number().int(),
  readingIds: z.array(z.uuid()),
  otherPositions: z.array(z.strictObject({ name: z.string(), levelDba: z.number(), u: z.number() })),
});
export type SnapshotPoint = z.infer<typeof snapshotPointSchema>;

export const againstSchema = z.strictObject({
  setSpeed: z.number(),
  levelDifferenceDb: figureSchema,
  levelIsBound: z.boolean(),
  deltaTDifferenceK: figureSchema,
  resistanceRatio: figureSchema,
});

export const notReachedWhy = z.enum(["entry-not-reached", "baseline-not-reached", "baseline-rests-on-bound"]);

export const equalNoiseSchema = z.union([
  z.strictObject({
    levelDba: z.number(),
    ratio: figureSchema,
    deltaT: figureSchema,
    difference: figureSchema,
    upperBound: z.boolean(),
  }),
  z.strictObject({ levelDba: z.number(), why: notReachedWhy }),
]);
export type EqualNoise = z.infer<typeof equalNoiseSchema>;

/** Third-octave levels in dB, as read and with the background taken out (an upper bound where it was too near). */
export const spectrumBandSchema = z.strictObject({
  nominalHz: z.number(),
  midHz: z.number(),
  levelDb: z.number().nullable(),
  correctedDb: z.number().nullable(),
  upperBound: z.boolean().nullable(),
});
export type SpectrumBandFigure = z.infer<typeof spectrumBandSchema>;

/** A subject's sound at a set speed and a microphone position; loudness is read where the microphone stood. */
export const setSpeedSpectrumSchema = z.strictObject({
  setSpeed: z.number(),
  position: z.string(),
  ofProtocol: z.boolean(),
  levelADba: z.number().nullable(),
  bands: z.array(spectrumBandSchema),
  tones: z.array(toneSchema),
  tonesOfRunId: z.uuid(),
  loudness: z.strictObject({ sone: z.number(), phon: z.number() }).nullable(),
  runs: z.int().positive(),
  spectrumIds: z.array(z.uuid()).min(1),
  backgroundIds: z.array(z.uuid()),
});
export type SetSpeedSpectrum = z.infer<typeof setSpeedSpectrumSchema>;

/** What tones are predicted from, beside the speeds: blade counts, rotor 1 first. Rotation null for one rotor. */
export const toneMakersSchema = z.strictObject({
  blades: z.array(z.int().positive()).min(1).max(2),
  rotation: z.enum(["counter", "co"]).nullable(),
  struts: z.int().min(0).nullable(),
});
export type ToneMakers = z.infer<typeof toneMakersSchema>;

/** Spectra of an entry and of its session's baseline. Absent where no spectrum of the entry stands. Version 1. */
export const spectraSchema = z.strictObject({
  version: z.literal(1),
  makers: z.strictObject({ entry: toneMakersSchema.nullable(), baseline: toneMakersSchema.nullable() }),
  entry: z.array(setSpeedSpectrumSchema).min(1),
  baseline: z.array(setSpeedSpectrumSchema),
});
export type Spectra = z.infer<typeof spectraSchema>;

/**
 * What a publication froze: an entry's figures with where each came from. Ids of people only, no rank: ranks stand in
 * standings, names are resolved when read. Version 1.
 */
export const snapshotSchema = z.strictObject({
  schemaVersion: z.literal(1),
  entryId: z.uuid(),
  revisionId: z.uuid(),
  designId: z.uuid(),
  seasonId: z.uuid(),
  roundId: z.uuid(),
  sessionId: z.uuid(),
  benchVersionId: z.uuid(),
  protocolVersionId: z.uuid(),
  budgetVersionId: z.uuid(),
  baselineUnitId: z.uuid(),
  ruleVersionId: z.uuid(),
  methodVersion: z.number().int().positive(),
  ownerIds: z.array(z.uuid()),
  specimenIds: z.array(z.uuid()),
  microphoneDistanceMm: z.number(),
  levelsDba: z.array(z.number()),
  headlineDba: z.number(),
  points: z.array(snapshotPointSchema),
  baselinePoints: z.array(snapshotPointSchema),
  against: z.array(againstSchema),
  equalNoise: z.array(equalNoiseSchema),
  equalCooling: z.strictObject({ levelDba: z.number(), differenceDb: figureSchema }).nullable(),
  budget: z.array(budgetLineSchema),
  notes: z.array(z.strictObject({ code: z.string(), message: z.string() })),
  leftOutRuns: z.array(z.strictObject({ runId: z.uuid(), why: z.string() })),
  /** Absent where no spectrum stands, so that what was published before keeps its digest. */
  spectra: spectraSchema.optional(),
  /** Budgets of the other figures; absent in what was published before they were kept. */
  budgets: budgetsSchema.optional(),
});
export type Snapshot = z.infer<typeof snapshotSchema>;
