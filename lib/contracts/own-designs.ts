import { z } from "zod";
import { ENTRY_STATES } from "@/lib/domain/designs/entry-moves";
import { id, slug, time } from "./base";

const words = (most: number) => z.string().trim().max(most);
export const licences = ["CC0-1.0", "CC-BY-4.0", "CC-BY-SA-4.0", "CC-BY-NC-4.0", "CC-BY-NC-SA-4.0"] as const;
export const materials = ["PLA", "PETG", "ABS", "ASA", "PA", "PC", "resin", "other"] as const;
export const inletStacks = ["none", "bellmouth", "cone", "straight"] as const;

export const newDesign = z.strictObject({
  name: words(80)
    .min(1, "is missing")
    .regex(/[a-z0-9]/i, "has no letter or figure that an address can be made of"),
  summary: words(2000).default(""),
});

export const rotorTraits = z.strictObject({
  blades: z.int().min(2).max(60),
  hand: z.enum(["right", "left"]),
  hubDiameterMm: z.number().positive().max(300).nullish(),
  tipDiameterMm: z.number().positive().max(300).nullish(),
  pitchMidDeg: z.number().min(0).max(90).nullish(),
  solidityMid: z.number().positive().max(5).nullish(),
  shroud: z.boolean().default(false),
  massG: z.number().positive().max(2000).nullish(),
});
export type RotorTraits = z.output<typeof rotorTraits>;

/** What a designer declares of a revision; a reading of the mesh stands beside it once there is one. */
export const declaredTraits = z
  .strictObject({
    counterRotating: z.boolean().default(false),
    spacerMm: z.number().min(0).max(200).default(0),
    inletStack: z.enum(inletStacks).default("none"),
    inletStackMm: z.number().min(0).max(300).default(0),
    struts: z.int().min(0).max(40).default(0),
    frameId: id,
    tipGapMm: z.number().min(0).max(50).nullish(),
    material: z.enum(materials),
    printTimeMin: z.number().positive().max(100_000).nullish(),
    rotors: z.array(rotorTraits).min(1, "names no rotor").max(4),
  })
  .refine((traits) => !traits.counterRotating || traits.rotors.length >= 2, {
    path: ["counterRotating"],
    error: "needs two rotors or more",
  })
  .refine((traits) => (traits.inletStack === "none") === (traits.inletStackMm === 0), {
    path: ["inletStackMm"],
    error: "is 0 without an inlet stack, and above 0 with one",
  })
  .refine(
    (traits) =>
      traits.rotors.every(
        (each) => !each.hubDiameterMm || !each.tipDiameterMm || each.hubDiameterMm < each.tipDiameterMm,
      ),
    {
      path: ["rotors"],
      error: "has a hub as wide as its tip",
    },
  );
export type DeclaredTraits = z.output<typeof declaredTraits>;

export const newRevision = z.strictObject({
  licence: z.enum(licences),
  changes: words(4000).default(""),
  printNotes: words(4000).default(""),
  traits: declaredTraits,
});
export type NewRevision = z.output<typeof newRevision>;

export const sendIn = z.strictObject({ letter: z.string().regex(/^[A-Z]{1,2}$/, "is no revision"), seasonId: id });
export const ownMove = z.strictObject({
  from: z.enum(ENTRY_STATES),
  to: z.enum(["sent_in", "withdrawn"]),
  reason: words(1000).optional(),
});

export const ownEntry = z.strictObject({
  entryId: id,
  letter: z.string(),
  seasonNumber: z.int(),
  seasonTitle: z.string(),
  state: z.enum(ENTRY_STATES),
  stateAt: time,
  /** What the host or the bench said with the newest move; null where nothing was said. */
  reason: z.string().nullable(),
  moves: z.array(z.enum(["sent_in", "withdrawn"])),
});
export type OwnEntry = z.infer<typeof ownEntry>;

export const ownRevision = z.strictObject({
  letter: z.string(),
  licence: z.string(),
  changes: z.string(),
  printNotes: z.string(),
  sentInAt: time.nullable(),
  frameKey: z.string(),
  material: z.string(),
  stages: z.int(),
  rotors: z.array(z.strictObject({ position: z.int(), blades: z.int(), hand: z.string() })),
});

export const ownDesign = z.strictObject({
  designId: id,
  name: z.string(),
  slug: z.string(),
  summary: z.string(),
  /** Something of it is public: it has a sheet. */
  isPublic: z.boolean(),
  revisions: z.array(ownRevision),
  entries: z.array(ownEntry),
});
export type OwnDesign = z.infer<typeof ownDesign>;
export const ownDesigns = z.strictObject({ items: z.array(ownDesign) });

export const openSeason = z.strictObject({ seasonId: id, title: z.string() });
export const ownChoices = z.strictObject({
  seasons: z.array(openSeason),
  frames: z.array(z.strictObject({ id, key: z.string() })),
});
export type OwnChoices = z.infer<typeof ownChoices>;

export const designMade = z.strictObject({ slug });
export const revisionMade = z.strictObject({ letter: z.string() });
export const entryMade = z.strictObject({ entryId: id, state: z.enum(ENTRY_STATES) });
export const slugEntryParams = z.strictObject({ slug, entryId: id });
