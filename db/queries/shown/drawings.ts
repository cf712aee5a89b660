import type { Handle } from "../../client/connect";

export interface ShownDrawing {
  entryId: string;
  attachmentId: string;
  name: string;
  bytes: number;
  kind: string;
  readerVersion: string;
  drawing: unknown;
  thumbnail: unknown;
}

/** The newest drawing of a public entry's newest model that has one, with the file that it is drawn from. */
export async function shownDrawingOfEntry(
  db: Handle,
  { entryId }: { entryId: string },
): Promise<ShownDrawing | undefined> {
  return db("shown.mesh_drawing as d")
    .join("shown.entry as e", "e.revision_id", "d.revision_id")
    .join("shown.attachment as a", "a.id", "d.attachment_id")
    .where("e.entry_id", entryId)
    .orderBy([
      { column: "d.ordinal", order: "desc" },
      { column: "d.at", order: "desc" },
    ])
    .first<ShownDrawing | undefined>({
      entryId: "e.entry_id",
      attachmentId: "a.id",
      name: "a.name",
      bytes: "a.bytes",
      kind: "a.kind",
      readerVersion: "d.reader_version",
      drawing: "d.drawing",
      thumbnail: "d.thumbnail",
    });
}
