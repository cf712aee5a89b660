import type { Metadata } from "next";
import Link from "next/link";
import { AuditTable } from "@/components/host/audit-table";
import { Section } from "@/components/ui/sheet";
import { orPageState, personForPage } from "@/lib/auth/page";
import { auditQuery } from "@/lib/contracts/audit";
import { readAudit } from "@/lib/server/audit/audit";

export const metadata: Metadata = { title: "Audit log" };

const path = "/host/audit";

export default async function AuditPage({
  searchParams,
}: {
  searchParams: Promise<Record<string, string | string[] | undefined>>;
}) {
  const actor = await personForPage(path);
  const parsed = auditQuery.safeParse(await searchParams);
  const query = parsed.success ? parsed.data : {};
  const page = await orPageState(readAudit(actor, query), path);
  const narrowed = query.subjectKind !== undefined || query.subjectId !== undefined;
  return (
    <Section id="audit" title="Audit log" level={1}>
      <p className="mb-4 max-w-2xl">
        Who did what to which thing, newest first. Rows are written with the act itself and never change; they hold ids,
        states and figures, and names are looked up as they are today.
      </p>
      {narrowed ? (
        <p className="mb-4">
          Only what was done to {query.subjectKind ?? "anything"} <code>{query.subjectId ?? ""}</code>.{" "}
          <Link href={path}>Show everything</Link>
        </p>
      ) : null}
      <AuditTable page={page} query={query} path={path} />
    </Section>
  );
}
