import type { Handle } from "@/db/client/connect";
import { appDb } from "@/db/client/handles";
import { insertAudit, listAudit } from "@/db/queries/audit";
import { handlesOf } from "@/db/queries/people";
import type { AuditPage } from "@/lib/contracts/audit";
import type { Actor } from "@/lib/domain/accounts/actor";
import { isPerson } from "@/lib/domain/accounts/actor";
import { cutPage } from "../cut-page";
import { demand } from "../permission";

/** Who asks, and the request it belongs to. Use-cases that change something take it first. */
export interface Asked {
  actor: Actor;
  requestId: string | null;
}

export interface AuditNote {
  /** Kind and act, as in `person.role`. */
  action: string;
  subjectKind: string;
  subjectId: string;
  /** Ids, states and figures only: never a name or an address, since rows stay for ever. */
  before?: unknown;
  after?: unknown;
}

/** Writes an audit row within the caller's transaction. */
export async function note(handle: Handle, { actor, requestId }: Asked, entry: AuditNote): Promise<void> {
  await insertAudit(handle, {
    before: undefined,
    after: undefined,
    ...entry,
    actorId: isPerson(actor) ? actor.personId : null,
    requestId,
  });
}

/** The audit log for the host, newest first, with handles as they are today. */
export async function readAudit(
  actor: Actor,
  params: { subjectKind?: string; subjectId?: string; after?: number; limit?: number },
): Promise<AuditPage> {
  demand(actor, "audit.read");
  const limit = params.limit ?? 50;
  const { after, ...where } = params;
  const rows = await listAudit(appDb(), {
    ...where,
    limit: limit + 1,
    ...(after !== undefined && { beforeId: after }),
  });
  const { page, next } = cutPage(rows, limit, ({ auditId }) => String(auditId));
  const handles = await handlesOf(appDb(), { personIds: page.flatMap((row) => row.actorId ?? []) });
  return {
    items: page.map(({ actorId, at, before, after: then, ...rest }) => ({
      ...rest,
      at: at.toISOString(),
      actorHandle: actorId === null ? null : (handles.get(actorId) ?? null),
      before: before ?? null,
      after: then ?? null,
    })),
    next,
  };
}
