import { z } from "zod";
import { toneSchema } from "./tone";

const figure = z.number().nullable();
const said = z.strictObject({ code: z.string(), message: z.string() });
const span = z.strictObject({ fromS: z.number(), toS: z.number() });
const band = { nominalHz: z.number(), midHz: z.number(), levelDb: figure };

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
  tones: z.array(toneSchema),
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
