import { z } from "zod";
import { slug } from "./base";

export const kitFrameParams = z.strictObject({
  slug,
  frame: z.string().regex(/^\d{2,3}x\d{1,3}(-[a-z0-9]{1,12})?$/, "is no frame"),
});
export const kitSolidParams = z.strictObject({ slug, id: z.uuid() });

const corner = z.tuple([z.number(), z.number(), z.number()]);

export const kitFrame = z.strictObject({
  key: z.string(),
  sizeMm: z.number(),
  depthMm: z.number(),
  boreMm: z.number(),
  holeSpacingMm: z.number(),
  holeMm: z.number(),
  toleranceMm: z.number(),
});
export type KitFrame = z.infer<typeof kitFrame>;

/** A keep-out solid in cooler coordinates, mm: a box by its corners, a mesh by its file alone. */
export const kitSolid = z.strictObject({
  id: z.uuid(),
  name: z.string(),
  note: z.string(),
  shape: z.enum(["box", "mesh"]),
  minMm: corner.nullable(),
  maxMm: corner.nullable(),
});
export type KitSolid = z.infer<typeof kitSolid>;

/** What a model must fit in a season: frames, limits, and what stands around the bench's cooler. Null: no limit. */
export const kitSchema = z.strictObject({
  season: z.strictObject({ slug: z.string(), title: z.string() }),
  bench: z.strictObject({ name: z.string(), version: z.int() }).nullable(),
  totalDepthMaxMm: z.number().nullable(),
  inletStackMaxMm: z.number().nullable(),
  frames: z.array(kitFrame),
  solids: z.array(kitSolid),
});
export type Kit = z.infer<typeof kitSchema>;
