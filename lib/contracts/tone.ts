import { z } from "zod";

const toneMatchSchema = z.strictObject({
  kind: z.enum(["blade-passing", "interaction"]),
  rotor: z.union([z.literal(1), z.literal(2)]).nullable(),
  m1: z.int(),
  m2: z.int(),
  strutModes: z.array(z.int()).nullable(),
  residualHz: z.number(),
});

/** A tone found, with its ratios and which predicted one it is; prominent is null where the standard doesn't reach. */
export const toneSchema = z.strictObject({
  frequencyHz: z.number(),
  levelDb: z.number(),
  toneToNoiseDb: z.number().nullable(),
  prominenceDb: z.number().nullable(),
  prominent: z.boolean().nullable(),
  match: toneMatchSchema.extend({ alsoMatches: z.array(toneMatchSchema) }).nullable(),
});
