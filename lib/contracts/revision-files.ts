import { z } from "zod";
import { id, slug } from "./base";
import { inletStacks } from "./own-designs";
import { purposeNames } from "./uploads";

export const revisionParams = z.strictObject({ slug, letter: z.string().regex(/^[A-Z]{1,2}$/, "is no revision") });

/** A trait that is confirmed: what was read holds, or what a person declares; null declares that it isn't known. */
const choice = <T extends z.ZodType>(value: T) =>
  z.discriminatedUnion("from", [
    z.strictObject({ from: z.literal("read") }),
    z.strictObject({ from: z.literal("declared"), value }),
  ]);
const length = z.number().positive().max(300).nullable();

/** Traits of one rotor, each with where it comes from. Ranges are those of a draft's own form. */
export const rotorChoices = z.strictObject({
  blades: choice(z.int().min(2).max(60)),
  hand: choice(z.enum(["right", "left"])),
  hubDiameterMm: choice(length),
  tipDiameterMm: choice(length),
  sweptDiameterMm: choice(length),
  axialDepthMm: choice(length),
  pitchMidDeg: choice(z.number().min(0).max(90).nullable()),
  chordMidMm: choice(length),
  solidityMid: choice(z.number().positive().max(5).nullable()),
  shroud: choice(z.boolean()),
  unequalSpacing: choice(z.boolean()),
  massG: choice(z.number().positive().max(2000).nullable()),
});
export type RotorChoices = z.infer<typeof rotorChoices>;
export type RotorTraitName = keyof RotorChoices;
export const rotorTraitNames = Object.keys(rotorChoices.shape) as RotorTraitName[];

export const wholeChoices = z.strictObject({
  spacerMm: choice(z.number().min(0).max(200)),
  struts: choice(z.int().min(0).max(40)),
  /** Kind and length of the inlet stack go together; left out, both stay as they are. */
  inletStack: choice(z.enum(inletStacks)).optional(),
  inletStackMm: choice(z.number().min(0).max(300)).optional(),
});
export type WholeChoices = z.infer<typeof wholeChoices>;
export const wholeTraitNames = Object.keys(wholeChoices.shape) as (keyof WholeChoices)[];

/** Confirms the traits of a draft against the reading of one of its files. */
export const confirmTraits = z.strictObject({
  attachmentId: id,
  whole: wholeChoices,
  rotors: z.array(rotorChoices).min(1, "names no rotor").max(4),
});
export type ConfirmTraits = z.infer<typeof confirmTraits>;

const value = z.union([z.number(), z.string(), z.boolean()]).nullable();
export type TraitValue = z.infer<typeof value>;

/** One trait: what the mesh tells, what was declared, which was confirmed to hold. Null for what isn't known or confirmed. */
export const traitLine = z.strictObject({
  read: value,
  declared: value,
  holds: z.enum(["read", "declared"]).nullable(),
});
export type TraitLine = z.infer<typeof traitLine>;

export const revisionFiles = z.strictObject({
  revisionId: id,
  designName: z.string(),
  letter: z.string(),
  sentIn: z.boolean(),
  files: z.array(
    z.strictObject({
      attachmentId: id,
      role: z.enum(purposeNames),
      name: z.string(),
      bytes: z.int(),
      kind: z.string(),
      gone: z.boolean(),
    }),
  ),
  /** What the newest model that could be measured tells; null while there is none. */
  reading: z
    .strictObject({
      attachmentId: id,
      name: z.string(),
      readerVersion: z.string(),
      unit: z.strictObject({ mmPerUnit: z.number(), from: z.enum(["file", "said", "guessed"]) }),
      triangles: z.int(),
      watertight: z.boolean(),
      /** 0–1, the lowest of its rotors; null without one. */
      confidence: z.number().nullable(),
      /** 0–1 of what stands still, where it is in the file. */
      sure: z.strictObject({
        struts: z.number().nullable(),
        inletStack: z.number().nullable(),
        spacer: z.number().nullable(),
      }),
      warnings: z.array(z.strictObject({ code: z.string(), message: z.string() })),
    })
    .nullable(),
  whole: z.record(z.string(), traitLine),
  rotors: z.array(z.strictObject({ position: z.int(), seen: z.boolean(), traits: z.record(z.string(), traitLine) })),
});
export type RevisionFiles = z.infer<typeof revisionFiles>;
