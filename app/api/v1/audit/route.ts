import { auditPage, auditQuery } from "@/lib/contracts/audit";
import { route } from "@/lib/http/route";
import { readAudit } from "@/lib/server/audit/audit";

/** The audit log, for the host. */
export const GET = route({ access: "signed_in", query: auditQuery }, async ({ actor, query }) =>
  auditPage.parse(await readAudit(actor, query)),
);
