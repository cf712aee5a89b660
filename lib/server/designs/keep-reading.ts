import type { Handle } from "@/db/client/connect";
import { insertMeshDrawing, insertMeshReading } from "@/db/queries/mesh-readings";
import { READER_VERSION } from "@/lib/science/geometry/reader-version";
import type { MeshRead } from "./read-mesh";

/** Keeps what this version of the reader found in a file, and its drawing where one was made. */
export async function keepReading(db: Handle, fileId: string, { result, drawing }: MeshRead): Promise<void> {
  await insertMeshReading(db, { fileId, readerVersion: READER_VERSION, result });
  if (drawing) await insertMeshDrawing(db, { fileId, readerVersion: READER_VERSION, drawing });
}
