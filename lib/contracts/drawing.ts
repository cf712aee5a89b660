import { z } from "zod";

const number = z.number();

/** One view of a drawing: lengths in mm, y downwards, path data without style. */
export const drawnView = z.object({
  title: z.string(),
  minX: number,
  minY: number,
  width: number,
  height: number,
  outlines: z.array(z.object({ d: z.string(), covers: z.boolean() })),
  centres: z.string(),
  dashed: z.string(),
  dimensions: z.string(),
  words: z.array(z.object({ x: number, y: number, text: z.string(), upright: z.boolean() })),
  textMm: number,
});

/** Front and side of one fan, to one scale. */
export const fanDrawingSchema = z.object({ front: drawnView, side: drawnView, from: z.enum(["mesh", "traits"]) });
export type StoredFanDrawing = z.infer<typeof fanDrawingSchema>;

/** The front alone, small and without dimensions. */
export const thumbnailSchema = z.object({ minX: number, minY: number, width: number, height: number, d: z.string() });
export type Thumbnail = z.infer<typeof thumbnailSchema>;

/** What is kept of a mesh's drawing. */
export const meshDrawing = z.object({ drawing: fanDrawingSchema, thumbnail: thumbnailSchema });
export type MeshDrawing = z.infer<typeof meshDrawing>;

/** A public entry's drawing with the model file that it is made of, which everybody may take. */
export interface SheetDrawing {
  readonly drawing: StoredFanDrawing;
  readonly thumbnail: Thumbnail;
  readonly readerVersion: string;
  readonly model: { readonly attachmentId: string; readonly name: string; readonly bytes: number };
}
