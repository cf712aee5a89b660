import { z } from "zod";
import { id, time } from "./base";

const megabyte = 1_000_000;

/** What may be sent for what: the largest file in bytes, and the kinds found by content that are taken. */
export const uploadPurposes = {
  model: { maxBytes: 300 * megabyte, kinds: ["stl", "3mf", "step"] },
  source: { maxBytes: 100 * megabyte, kinds: ["stl", "3mf", "step", "text", "unknown"] },
  print_profile: { maxBytes: 5 * megabyte, kinds: ["text"] },
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
});
export type NewUpload = z.infer<typeof newUpload>;

/** What became of an upload; `progress` says what was read so far. */
export const uploadAnswer = z.strictObject({
  uploadId: z.uuid(),
  purpose: z.enum(purposeNames),
  name: z.string(),
  bytes: z.int(),
  state: z.enum(["sending", "received", "read", "refused"]),
  progress: z.record(z.string(), z.unknown()),
  reason: z.string().nullable(),
  fileId: z.uuid().nullable(),
  createdAt: time,
});
export type UploadAnswer = z.infer<typeof uploadAnswer>;
