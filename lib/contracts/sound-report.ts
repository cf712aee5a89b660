import { z } from "zod";

const figure = z.number().nullable();
const said = z.strictObject({ code: z.string(), message: z.string() });
const span = z.strictObject({ fromS: z.number(), toS: z.number() });
const band = { nominalHz: z.number(), midHz: z.number(), levelDb: figure };

const match = z.strictObject({
  kind: z.enum(["blade-passing", "interaction"]),
  rotor: z.union([z.literal(1), z.literal(2)]).nullable(),
  m1: z.int(),
  m2: z.int(),
  strutModes: z.array(z.int()).nullable(),
  residualHz: z.number(),
});

/** What is read from a recording: the object that the command line prints. Levels in dB, null where a thing can't be known. */
export const soundReport = z.strictObject({
  kind: z.literal("sound"),
  durationS: z.number(),
  usedS: z.number(),
  disturbed: z.array(span),
  sampleRateHz: z.number(),
  levelZDb: figure,
  levelCDb: figure,
  levelADba: figure,
  bands: z.array(z.strictObject(band)),
  bandsCorrected: z
    .array(z.strictObject({ ...band, marginDb: figure, correctionDb: figure, upperBound: z.boolean().nullable() }))
    .nullable(),
  background: z
    .strictObject({ levelADba: z.number(), marginDb: z.number(), correctionDb: z.number(), upperBound: z.boolean() })
    .nullable(),
  correctedDba: figure,
  speedsRpm: z.array(z.number()).nullable(),
  tones: z.array(
    z.strictObject({
      frequencyHz: z.number(),
      levelDb: z.number(),
      toneToNoiseDb: figure,
      prominenceDb: figure,
      prominent: z.boolean().nullable(),
      match: z.strictObject({ ...match.shape, alsoMatches: z.array(match) }).nullable(),
    }),
  ),
  loudness: z.strictObject({ sone: z.number(), phon: z.number() }).nullable(),
  warnings: z.array(said),
});
export type SoundReportView = z.infer<typeof soundReport>;

/** What a calibrator recording says, in dB, Hz and s. */
export const calibratorReport = z.strictObject({
  levelDb: z.number(),
  readDb: z.number(),
  toneHz: z.number(),
  steadyS: z.number(),
  unitLevelDb: z.number(),
  fullScaleSineDb: z.number(),
});
