import Link from "next/link";
import { BarsTable } from "@/components/ui/bars/bars-table";
import { Fold } from "@/components/ui/fold";
import { EmptyState } from "@/components/ui/states";
import type { AuditPage } from "@/lib/contracts/audit";
import { formatDateTime } from "@/lib/format/dates";

interface Narrowed {
  subjectKind?: string;
  subjectId?: string;
}

/** The audit log as a table; each row leads to all that was done to the same thing. `path` is the page it stands on. */
export function AuditTable({ page, query, path }: { page: AuditPage; query: Narrowed; path: string }) {
  if (page.items.length === 0) return <EmptyState title="Nothing">Nothing was written down of this.</EmptyState>;
  return (
    <>
      <BarsTable
        caption="Audit log, newest first"
        phone="fold"
        columns={[
          { key: "at", head: "At" },
          { key: "who", head: "Who" },
          { key: "did", head: "Did" },
          { key: "what", head: "To what" },
          { key: "change", head: "Change" },
        ]}
        rows={page.items.map((item) => ({
          key: String(item.auditId),
          cells: {
            at: { words: formatDateTime(item.at) },
            who: { words: item.actorHandle ?? "the program, or somebody erased" },
            did: { words: item.action.replaceAll(".", ": ").replaceAll("_", " ") },
            what: {
              words: (
                <Link href={hrefOf(path, { subjectKind: item.subjectKind, subjectId: item.subjectId })}>
                  {item.subjectKind.replaceAll("_", " ")} <code>…{item.subjectId.slice(-8)}</code>
                </Link>
              ),
            },
            change: { words: <Change before={item.before} after={item.after} /> },
          },
        }))}
      />
      {page.next === null ? null : (
        <p className="mt-4">
          <Link href={hrefOf(path, { ...query, after: page.next })}>Older</Link>
        </p>
      )}
    </>
  );
}

/** Longer than this it folds, letters. */
const shortMost = 90;

function Change({ before, after }: { before: unknown; after: unknown }) {
  const parts = [
    { name: "before", value: before },
    { name: "after", value: after },
  ].flatMap(({ name, value }) => (value === null ? [] : [{ name, text: JSON.stringify(value) }]));
  return parts.map(({ name, text }) =>
    text.length <= shortMost ? (
      <p key={name}>
        {name} <code className="break-all">{text}</code>
      </p>
    ) : (
      <Fold key={name} title={name}>
        <code className="break-all">{text}</code>
      </Fold>
    ),
  );
}

function hrefOf(path: string, asked: Record<string, string | undefined>): string {
  const given = Object.entries(asked).filter((pair): pair is [string, string] => pair[1] !== undefined);
  return `${path}?${new URLSearchParams(given)}`;
}
