import { z } from "zod";
import type { FileKind } from "@/lib/domain/designs/file-kind";
import { id, time } from "./base";

const megabyte = 1_000_000;

/** What may be sent for what: the largest file in bytes, and the kinds found by content that are taken. */
export const uploadPurposes = {
  model: { maxBytes: 300 * megabyte, kinds: ["stl", "3mf", "step"] },
  source: { maxBytes: 100 * megabyte, kinds: ["stl", "3mf", "step", "text", "csv", "unknown"] },
  print_profile: { maxBytes: 5 * megabyte, kinds: ["text", "csv"] },
  photograph: { maxBytes: 30 * megabyte, kinds: ["png", "jpeg", "webp"] },
  log: { maxBytes: 64 * megabyte, kinds: ["csv", "text"] },
  recording: { maxBytes: 200 * megabyte, kinds: ["wav"] },
} as const;
export type UploadPurpose = keyof typeof uploadPurposes;
export const purposeNames = Object.keys(uploadPurposes) as UploadPurpose[];

/** Announces an upload: what it is for and how long it is; the length is held to. */
export const newUpload = z.strictObject({
  purpose: z.enum(purposeNames),
  subjectId: id,
  name: z.string().trim().min(1).max(255),
  bytes: z.int().positive(),
  /** Of a model: millimetres in one unit of the file, as a person knows them; guessed from the size where left out. */
  mmPerUnit: z.number().positive().max(1000).optional(),
});
export type NewUpload = z.infer<typeof newUpload>;

/** What is being done with a file that is all there; triangles are counted while a model is read. */
export const uploadProgress = z.object({
  stage: z.enum(["reading", "measuring", "done"]).optional(),
  trianglesRead: z.int().optional(),
  trianglesExpected: z.int().optional(),
  kind: z.string().optional(),
  /** Whether a model was measured; STEP is kept and not measured. */
  measured: z.boolean().optional(),
});
export type UploadProgress = z.infer<typeof uploadProgress>;

/** What became of an upload. `address` is where its bytes are still sent to by tus, null once they are all there. */
export const uploadAnswer = z.strictObject({
  uploadId: z.uuid(),
  purpose: z.enum(purposeNames),
  name: z.string(),
  bytes: z.int(),
  sentBytes: z.int(),
  address: z.string().nullable(),
  state: z.enum(["sending", "received", "read", "refused"]),
  progress: uploadProgress,
  reason: z.string().nullable(),
  attachmentId: z.uuid().nullable(),
  createdAt: time,
});
export type UploadAnswer = z.infer<typeof uploadAnswer>;

/** An upload that may begin. */
export const begunUpload = z.strictObject({ uploadId: z.uuid(), address: z.string(), pieceBytes: z.int() });

export const uploadsQuery = z.strictObject({ subject: id });
export const uploadsAnswer = z.strictObject({ items: z.array(uploadAnswer) });

/** Media types by the kind found in the content (IANA's registry of media types). */
export const fileTypes: Readonly<Record<FileKind, string>> = {
  stl: "model/stl",
  "3mf": "model/3mf",
  step: "model/step",
  csv: "text/csv; charset=utf-8",
  wav: "audio/vnd.wave",
  png: "image/png",
  jpeg: "image/jpeg",
  webp: "image/webp",
  pdf: "application/pdf",
  text: "text/plain; charset=utf-8",
  unknown: "application/octet-stream",
};
