import type { UploadPurpose } from "@/lib/contracts/uploads";
import type { Handle } from "../client/connect";

export interface UploadRow {
  id: string;
  personId: string;
  purpose: UploadPurpose;
  subjectId: string;
  quarantineKey: string;
  name: string;
  bytes: number;
  state: "sending" | "received" | "read" | "refused";
  fileId: string | null;
  progress: Record<string, unknown>;
  reason: string | null;
  createdAt: Date;
  /** Said of a model; null where it is to be guessed. */
  mmPerUnit: number | null;
}

const columns = {
  id: "id",
  personId: "person_id",
  purpose: "purpose",
  subjectId: "subject_id",
  quarantineKey: "quarantine_key",
  name: "name",
  bytes: "bytes",
  state: "state",
  fileId: "file_id",
  progress: "progress",
  reason: "reason",
  createdAt: "created_at",
  mmPerUnit: "mm_per_unit",
} as const;

export async function insertUpload(
  db: Handle,
  upload: Pick<UploadRow, "personId" | "purpose" | "subjectId" | "quarantineKey" | "name" | "bytes"> & {
    mmPerUnit?: number | undefined;
  },
): Promise<string> {
  const [made]: { id: string }[] = await db("upload")
    .insert({
      person_id: upload.personId,
      purpose: upload.purpose,
      subject_id: upload.subjectId,
      quarantine_key: upload.quarantineKey,
      name: upload.name,
      bytes: upload.bytes,
      mm_per_unit: upload.mmPerUnit ?? null,
    })
    .returning("id");
  if (!made) throw new Error("no upload came back");
  return made.id;
}

/** An upload by its id or its one-use key. With `lock` its row is held until the transaction ends. */
export async function uploadBy(
  db: Handle,
  { uploadId, quarantineKey, lock = false }: { uploadId?: string; quarantineKey?: string; lock?: boolean },
): Promise<UploadRow | undefined> {
  const by = uploadId === undefined ? { quarantine_key: quarantineKey ?? "" } : { id: uploadId };
  return db("upload")
    .where(by)
    .modify((query) => void (lock && query.forUpdate()))
    .first<UploadRow | undefined>(columns);
}

export async function changeUpload(
  db: Handle,
  {
    uploadId,
    ...change
  }: {
    uploadId: string;
    state?: UploadRow["state"];
    fileId?: string;
    reason?: string;
    progress?: Record<string, unknown>;
    finishedAt?: Date;
  },
): Promise<void> {
  await db("upload")
    .where({ id: uploadId })
    .update({
      ...(change.state && { state: change.state }),
      ...(change.fileId && { file_id: change.fileId }),
      ...(change.reason !== undefined && { reason: change.reason }),
      ...(change.progress && { progress: JSON.stringify(change.progress) }),
      ...(change.finishedAt && { finished_at: change.finishedAt }),
    });
}

/** Ends an upload that isn't finished, with a reason. @returns whether there was one to end */
export async function endUpload(
  db: Handle,
  { uploadId, reason, finishedAt }: { uploadId: string; reason: string; finishedAt: Date },
): Promise<boolean> {
  const ended = await db("upload")
    .where({ id: uploadId })
    .whereIn("state", ["sending", "received"])
    .update({ state: "refused", reason, finished_at: finishedAt });
  return ended > 0;
}

/** Tells how far a file's reading is. @returns false when the upload was ended meanwhile */
export async function tellProgress(
  db: Handle,
  { uploadId, progress }: { uploadId: string; progress: Record<string, unknown> },
): Promise<boolean> {
  const told = await db("upload")
    .where({ id: uploadId, state: "received" })
    .update({ progress: JSON.stringify(progress) });
  return told > 0;
}

/** Why a file of this content was taken down; undefined when none was. */
export async function takenDownReason(db: Handle, { sha256 }: { sha256: string }): Promise<string | undefined> {
  const row = await db("file").where({ sha256, state: "taken_down" }).first<{ reason: string } | undefined>("reason");
  return row?.reason;
}

/** A person's latest uploads for one subject, newest first. */
export async function uploadsOf(
  db: Handle,
  { personId, subjectId, limit = 20 }: { personId: string; subjectId: string; limit?: number },
): Promise<UploadRow[]> {
  return db("upload")
    .where({ person_id: personId, subject_id: subjectId })
    .orderBy([{ column: "created_at", order: "desc" }, { column: "id" }])
    .limit(limit)
    .select<UploadRow[]>(columns);
}

/** The file of this content: the one that is there already, or a new one. Nobody is told which. */
export async function fileOfContent(
  db: Handle,
  file: { sha256: string; bytes: number; kind: string; storageKey: string; receivedFrom: string },
): Promise<string> {
  await db("file")
    .insert({
      sha256: file.sha256,
      bytes: file.bytes,
      kind: file.kind,
      state: "read",
      storage_key: file.storageKey,
      received_from: file.receivedFrom,
    })
    .onConflict("sha256")
    .ignore();
  const row = await db("file").where({ sha256: file.sha256 }).first<{ id: string } | undefined>("id");
  if (!row) throw new Error("no file came back");
  return row.id;
}

/** Attaches a file to a revision at the next place of its role. */
export async function attachFile(
  db: Handle,
  { revisionId, fileId, role, name }: { revisionId: string; fileId: string; role: string; name: string },
): Promise<string> {
  const last = await db("attachment")
    .where({ revision_id: revisionId, role })
    .max<{ max: number | null }>("ordinal as max")
    .first();
  const [made]: { id: string }[] = await db("attachment")
    .insert({ revision_id: revisionId, file_id: fileId, role, name, ordinal: (last?.max ?? 0) + 1 })
    .returning("id");
  if (!made) throw new Error("no attachment came back");
  return made.id;
}

/** Who owns the design of a revision today, and whether it was sent in; undefined for no such revision. */
export async function revisionForUpload(
  db: Handle,
  { revisionId, personId }: { revisionId: string; personId: string },
): Promise<{ owned: boolean; sentIn: boolean } | undefined> {
  const { rows }: { rows: { owned: boolean; sentIn: boolean }[] } = await db.raw(
    `select r.sent_in_at is not null as "sentIn", exists (select 1 from design_owner o
       where o.design_id = r.design_id and o.person_id = :personId and o.until_at is null) as owned
     from revision r where r.id = :revisionId`,
    { revisionId, personId },
  );
  return rows[0];
}

/** Uploads that were neither finished nor read since a moment; for the sweep. */
export async function abandonedUploads(
  db: Handle,
  { before, limit = 100 }: { before: Date; limit?: number },
): Promise<UploadRow[]> {
  return db("upload")
    .whereIn("state", ["sending", "received"])
    .where("created_at", "<", before)
    .limit(limit)
    .select<UploadRow[]>(columns);
}
