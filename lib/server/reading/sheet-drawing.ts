import { publicDb } from "@/db/client/handles";
import { shownDrawingOfEntry } from "@/db/queries/shown/drawings";
import { meshDrawing, type SheetDrawing } from "@/lib/contracts/drawing";

/** The drawing made from a public entry's mesh; null where none of its files was measured, or it was taken down. */
export async function readSheetDrawing({ entryId }: { entryId: string }): Promise<SheetDrawing | null> {
  const found = await shownDrawingOfEntry(publicDb(), { entryId });
  if (!found) return null;
  const { attachmentId, name, bytes, readerVersion } = found;
  return { ...meshDrawing.parse(found), readerVersion, model: { attachmentId, name, bytes } };
}
