import { z } from "zod";
import { pageOf, time, wholeText } from "./base";

export const auditItem = z.strictObject({
  auditId: z.int(),
  /** Null for the program itself, and for somebody who was erased. */
  actorHandle: z.string().nullable(),
  action: z.string(),
  subjectKind: z.string(),
  subjectId: z.string(),
  before: z.unknown(),
  after: z.unknown(),
  requestId: z.string().nullable(),
  at: time,
});
export const auditPage = pageOf(auditItem);
export type AuditPage = z.infer<typeof auditPage>;

export const auditQuery = z.strictObject({
  subjectKind: z.string().max(60).optional(),
  subjectId: z.string().max(100).optional(),
  after: wholeText(1, 999_999_999).optional(),
  limit: wholeText(1, 200).optional(),
});
