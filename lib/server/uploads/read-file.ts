import { appDb } from "@/db/client/handles";
import {
  abandonedUploads,
  attachFile,
  changeUpload,
  endUpload,
  fileOfContent,
  takenDownReason,
  uploadBy,
  type UploadRow,
} from "@/db/queries/uploads";
import { uploadPurposes, type UploadProgress } from "@/lib/contracts/uploads";
import { Refusal } from "@/lib/science/refusal";
import { dropQuarantined, quarantined } from "@/lib/services/quarantine/quarantine";
import { keepReading } from "../designs/keep-reading";
import type { MeshRead } from "../designs/read-mesh";
import { contentOf, keepContent, photographOf, type Content } from "./content";
import { measureModel } from "./measure-model";

const day = 86_400_000;

/**
 * Reads an upload that is all there: its SHA-256, its kind by content, and a model's mesh; then it is copied to its
 * content address if nothing is there yet, and attached to what it is for. What isn't taken is refused with the reason.
 * All of it is done for every upload, whether its content is known or not, so that nobody learns which. Working it twice
 * does nothing the second time.
 */
export async function readQuarantinedFile(uploadId: string, now: () => Date): Promise<void> {
  const row = await uploadBy(appDb(), { uploadId });
  if (!row || row.state !== "received") return;
  try {
    const { open, bytes } = await quarantined(row.quarantineKey);
    if (bytes !== row.bytes) throw new Refusal("length", "The length is not the announced one.");
    const content = await takenContent(row, await contentOf(open, bytes));
    const mesh = row.purpose === "model" ? await measureModel(row, content) : undefined;
    await keep(row, content, mesh, now());
  } catch (error) {
    if (!(error instanceof Refusal)) throw error;
    await endUpload(appDb(), { uploadId, reason: error.message, finishedAt: now() });
  }
  await dropQuarantined(row.quarantineKey);
}

/** What is kept of an upload. @throws Refusal for a kind that isn't taken, a picture that can't be opened, what was taken down */
async function takenContent({ purpose }: UploadRow, sent: Content): Promise<Content> {
  const { kinds } = uploadPurposes[purpose];
  if (!(kinds as readonly string[]).includes(sent.kind)) {
    const what = sent.kind === "unknown" ? "of no kind that is known here" : sent.kind;
    throw new Refusal("wrong-kind", `By its content this file is ${what}; taken are ${kinds.join(", ")}.`);
  }
  const kept = purpose === "photograph" ? await photographOf(sent) : sent;
  if (!kept) throw new Refusal("broken-picture", "The picture can't be opened: it is broken or too large to draw.");
  const gone = await takenDownReason(appDb(), { sha256: kept.sha256 });
  if (gone !== undefined) throw new Refusal("taken-down", `A file of this content was taken down: ${gone}`);
  return kept;
}

async function keep(row: UploadRow, content: Content, mesh: MeshRead | undefined, now: Date): Promise<void> {
  const { sha256, bytes, kind } = content;
  const storageKey = await keepContent(content);
  await appDb().transaction(async (tx) => {
    const still = await uploadBy(tx, { uploadId: row.id, lock: true });
    if (still?.state !== "received") return;
    const fileId = await fileOfContent(tx, { sha256, bytes, kind, storageKey, receivedFrom: row.personId });
    if (mesh) await keepReading(tx, fileId, mesh);
    const progress: UploadProgress & { attachmentId?: string } = { stage: "done", kind };
    if (row.purpose === "model") progress.measured = mesh !== undefined;
    if (row.purpose !== "log" && row.purpose !== "recording") {
      const place = { revisionId: row.subjectId, fileId, role: row.purpose, name: row.name };
      progress.attachmentId = await attachFile(tx, place);
    }
    await changeUpload(tx, { uploadId: row.id, state: "read", fileId, progress, finishedAt: now });
  });
}

/** Forgets uploads that nobody finished within a day. */
export async function sweepUploads(now: Date): Promise<number> {
  const abandoned = await abandonedUploads(appDb(), { before: new Date(now.getTime() - day) });
  for (const { id, quarantineKey } of abandoned) {
    await dropQuarantined(quarantineKey);
    await endUpload(appDb(), { uploadId: id, reason: "It was not finished within a day.", finishedAt: now });
  }
  return abandoned.length;
}
