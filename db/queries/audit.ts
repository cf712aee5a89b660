import type { Handle } from "@/db/client/connect";

export interface AuditEntry {
  actorId: string | null;
  action: string;
  subjectKind: string;
  subjectId: string;
  before: unknown;
  after: unknown;
  requestId: string | null;
}

export interface AuditRow extends AuditEntry {
  auditId: number;
  at: Date;
}

export async function insertAudit(handle: Handle, entry: AuditEntry): Promise<void> {
  await handle("audit").insert({
    actor_id: entry.actorId,
    action: entry.action,
    subject_kind: entry.subjectKind,
    subject_id: entry.subjectId,
    before: entry.before === undefined ? null : JSON.stringify(entry.before),
    after: entry.after === undefined ? null : JSON.stringify(entry.after),
    request_id: entry.requestId,
  });
}

/** Newest first; `beforeId` is the last id of the page before. */
export async function listAudit(
  handle: Handle,
  params: { subjectKind?: string; subjectId?: string; beforeId?: number; limit: number },
): Promise<AuditRow[]> {
  return handle("audit")
    .select<AuditRow[]>({
      auditId: "id",
      actorId: "actor_id",
      action: "action",
      subjectKind: "subject_kind",
      subjectId: "subject_id",
      before: "before",
      after: "after",
      requestId: "request_id",
      at: "at",
    })
    .modify((query) => {
      if (params.subjectKind) query.where({ subject_kind: params.subjectKind });
      if (params.subjectId) query.where({ subject_id: params.subjectId });
      if (params.beforeId !== undefined) query.where("id", "<", params.beforeId);
    })
    .orderBy("id", "desc")
    .limit(params.limit);
}
