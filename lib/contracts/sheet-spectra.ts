import { z } from "zod";
import { setSpeedSpectrumSchema } from "./publication";

/** A tone that blade counts and speeds put somewhere, whether it is heard or not. */
export const predictedToneSchema = z.strictObject({
  kind: z.enum(["blade-passing", "interaction"]),
  rotor: z.union([z.literal(1), z.literal(2)]).nullable(),
  m1: z.int(),
  m2: z.int(),
  frequencyHz: z.number(),
  modeOrder: z.int().nullable(),
  strutModes: z.array(z.int()).nullable(),
});
export type PredictedToneItem = z.infer<typeof predictedToneSchema>;

/** A set speed's spectrum as a sheet shows it: what was frozen, and every tone predicted at the speeds measured. */
export const sheetSpectrumSchema = setSpeedSpectrumSchema.extend({ predicted: z.array(predictedToneSchema) });
export type SheetSpectrum = z.infer<typeof sheetSpectrumSchema>;

/** Spectra of an entry and of its session's baseline, by set speed and microphone position. */
export const sheetSpectraSchema = z.strictObject({
  entry: z.array(sheetSpectrumSchema).min(1),
  baseline: z.array(sheetSpectrumSchema),
});
export type SheetSpectra = z.infer<typeof sheetSpectraSchema>;
