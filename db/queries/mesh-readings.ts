import type { MeshDrawing } from "@/lib/contracts/drawing";
import type { MeshReadingResult } from "@/lib/contracts/mesh-reading";
import type { Handle } from "../client/connect";

/** Keeps what a version of the reader found in a file; a version that has read it already keeps its first reading. */
export async function insertMeshReading(
  db: Handle,
  { fileId, readerVersion, result }: { fileId: string; readerVersion: string; result: MeshReadingResult },
): Promise<void> {
  await db("mesh_reading")
    .insert({ file_id: fileId, reader_version: readerVersion, result: JSON.stringify(result) })
    .onConflict(["file_id", "reader_version"])
    .ignore();
}

/** Keeps a mesh's drawing; a version of the reader that has drawn it already keeps its first one. */
export async function insertMeshDrawing(
  db: Handle,
  { fileId, readerVersion, drawing }: { fileId: string; readerVersion: string; drawing: MeshDrawing },
): Promise<void> {
  await db("mesh_drawing")
    .insert({
      file_id: fileId,
      reader_version: readerVersion,
      drawing: JSON.stringify(drawing.drawing),
      thumbnail: JSON.stringify(drawing.thumbnail),
    })
    .onConflict(["file_id", "reader_version"])
    .ignore();
}

export interface StoredReading {
  fileId: string;
  storageKey: string;
  bytes: number;
  /** The newest reading; null for a model that was never read. */
  readerVersion: string | null;
  result: unknown;
}

/** Model files that can be read, with the newest reading of each, in order of their ids after the one given. */
export async function modelFiles(
  db: Handle,
  { afterId, limit = 50 }: { afterId: string | null; limit?: number },
): Promise<StoredReading[]> {
  const { rows }: { rows: StoredReading[] } = await db.raw(
    `select f.id as "fileId", f.storage_key as "storageKey", f.bytes::float8 as bytes, m.reader_version as "readerVersion", m.result
     from file f
       left join lateral (select reader_version, result from mesh_reading m where m.file_id = f.id order by m.at desc, m.id desc limit 1) m on true
     where f.state = 'read' and f.kind in ('stl', '3mf') and (cast(:afterId as uuid) is null or f.id > :afterId)
       and exists (select 1 from attachment a where a.file_id = f.id and a.role = 'model')
     order by f.id limit :limit`,
    { afterId, limit },
  );
  return rows;
}

/** Where a model file is kept; undefined for one that is no mesh, or isn't there any more. */
export async function storedModel(
  db: Handle,
  { fileId }: { fileId: string },
): Promise<{ storageKey: string; bytes: number } | undefined> {
  return db("file")
    .where({ id: fileId, state: "read" })
    .whereIn("kind", ["stl", "3mf"])
    .first({ storageKey: "storage_key", bytes: "bytes" });
}

/** The newest reading of a revision's first model file that has one. */
export async function readingOfRevision(
  db: Handle,
  { revisionId }: { revisionId: string },
): Promise<{ attachmentId: string; name: string; readerVersion: string; result: unknown } | undefined> {
  const { rows } = await db.raw(
    `select a.id as "attachmentId", a.name, m.reader_version as "readerVersion", m.result
     from attachment a join mesh_reading m on m.file_id = a.file_id
     where a.revision_id = :revisionId and a.role = 'model'
     order by a.ordinal desc, m.at desc, m.id desc limit 1`,
    { revisionId },
  );
  return rows[0];
}
