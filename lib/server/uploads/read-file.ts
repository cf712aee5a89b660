import { createHash } from "node:crypto";
import { appDb } from "@/db/client/handles";
import { abandonedUploads, attachFile, changeUpload, fileOfContent, uploadBy } from "@/db/queries/uploads";
import { uploadPurposes } from "@/lib/contracts/uploads";
import { fileKind } from "@/lib/domain/designs/file-kind";
import { dropQuarantined, quarantined } from "@/lib/services/quarantine/quarantine";
import { storage } from "@/lib/services/storage/from-env";

const day = 86_400_000;

/**
 * Reads an upload that is all there: its SHA-256, its kind by content; then it is copied to its content address if
 * nothing is there yet, and attached to what it is for. A kind that isn't taken is refused with the reason. Working it
 * twice does nothing the second time.
 */
export async function readQuarantinedFile(uploadId: string, now: Date): Promise<void> {
  const row = await uploadBy(appDb(), { uploadId });
  if (!row || row.state !== "received") return;
  const { open, bytes } = await quarantined(row.quarantineKey);
  const { sha256, kind } = await readOnce(await open(), bytes);
  const { kinds } = uploadPurposes[row.purpose];
  if (bytes !== row.bytes || !(kinds as readonly string[]).includes(kind)) {
    const reason =
      bytes === row.bytes ? `This is ${kind}; taken are ${kinds.join(", ")}.` : "The length is not the announced one.";
    await changeUpload(appDb(), { uploadId, state: "refused", reason, finishedAt: now });
    await dropQuarantined(row.quarantineKey);
    return;
  }
  const storageKey = `content/${sha256.slice(0, 2)}/${sha256}`;
  if (!(await storage().head(storageKey))) await storage().put(storageKey, await open(), bytes);
  await appDb().transaction(async (tx) => {
    const still = await uploadBy(tx, { uploadId, lock: true });
    if (still?.state !== "received") return;
    const fileId = await fileOfContent(tx, { sha256, bytes, kind, storageKey, receivedFrom: row.personId });
    if (row.purpose !== "log" && row.purpose !== "recording") {
      await attachFile(tx, { revisionId: row.subjectId, fileId, role: row.purpose, name: row.name });
    }
    await changeUpload(tx, { uploadId, state: "read", fileId, progress: { bytes, kind }, finishedAt: now });
  });
  await dropQuarantined(row.quarantineKey);
}

async function readOnce(body: AsyncIterable<Uint8Array>, bytes: number) {
  const hash = createHash("sha256");
  let head = new Uint8Array(0);
  for await (const piece of body) {
    hash.update(piece);
    if (head.length < 1024) head = Uint8Array.from([...head, ...piece.subarray(0, 1024 - head.length)]);
  }
  return { sha256: hash.digest("hex"), kind: fileKind(head, bytes) };
}

/** Forgets uploads that nobody finished within a day. */
export async function sweepUploads(now: Date): Promise<number> {
  const abandoned = await abandonedUploads(appDb(), { before: new Date(now.getTime() - day) });
  for (const { id, quarantineKey } of abandoned) {
    await dropQuarantined(quarantineKey);
    await changeUpload(appDb(), {
      uploadId: id,
      state: "refused",
      reason: "It was not finished within a day.",
      finishedAt: now,
    });
  }
  return abandoned.length;
}
