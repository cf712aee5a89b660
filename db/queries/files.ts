import type { FileKind } from "@/lib/domain/designs/file-kind";
import type { Handle } from "../client/connect";

export interface AttachedFile {
  attachmentId: string;
  revisionId: string;
  name: string;
  role: string;
  sha256: string;
  bytes: number;
  kind: FileKind;
  state: "quarantined" | "read" | "refused" | "taken_down";
  storageKey: string;
  takenDownAt: Date | null;
  reason: string | null;
}

const columns = {
  attachmentId: "a.id",
  revisionId: "a.revision_id",
  name: "a.name",
  role: "a.role",
  sha256: "f.sha256",
  bytes: "f.bytes",
  kind: "f.kind",
  state: "f.state",
  storageKey: "f.storage_key",
  takenDownAt: "f.taken_down_at",
  reason: "f.reason",
} as const;

/** An attachment of a published revision, read through the public views. */
export async function shownFile(
  publicReader: Handle,
  { attachmentId }: { attachmentId: string },
): Promise<AttachedFile | undefined> {
  const one = Object.fromEntries(
    Object.entries(columns).map(([name, column]) => [name, column.replace(/^[af]\./, "")]),
  );
  return publicReader("shown.attachment").where({ id: attachmentId }).first<AttachedFile | undefined>(one);
}

/** An attachment of any revision, with who may see it before it is published. */
export async function attachedFile(
  db: Handle,
  { attachmentId, personId }: { attachmentId: string; personId: string },
): Promise<(AttachedFile & { ownsDesign: boolean; sentIn: boolean }) | undefined> {
  return db("attachment as a")
    .join("file as f", "f.id", "a.file_id")
    .join("revision as r", "r.id", "a.revision_id")
    .where("a.id", attachmentId)
    .first({
      ...columns,
      sentIn: db.raw("r.sent_in_at is not null"),
      ownsDesign: db.raw(
        `exists (select 1 from design_owner o where o.design_id = r.design_id and o.person_id = ? and o.until_at is null)`,
        [personId],
      ),
    });
}

/** Files of a revision in their order, for its owners. */
export async function filesOfRevision(db: Handle, { revisionId }: { revisionId: string }): Promise<AttachedFile[]> {
  return db("attachment as a")
    .join("file as f", "f.id", "a.file_id")
    .where("a.revision_id", revisionId)
    .orderBy(["a.role", "a.ordinal", "a.id"])
    .select<AttachedFile[]>(columns);
}

/** Takes an attachment off a draft; the database refuses it for a revision that was sent in. */
export async function dropAttachment(db: Handle, { attachmentId }: { attachmentId: string }): Promise<void> {
  await db("attachment").where({ id: attachmentId }).delete();
}
