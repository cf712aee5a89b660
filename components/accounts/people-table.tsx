import Link from "next/link";
import { BarsTable } from "@/components/ui/bars/bars-table";
import { EmptyState } from "@/components/ui/states";
import type { PeoplePage, PeopleQuery, PersonItem } from "@/lib/contracts/people";
import { formatDate } from "@/lib/format/dates";
import { RoleForm } from "./role-form";

const columns = [
  { key: "handle", head: "Handle" },
  { key: "email", head: "Address" },
  { key: "since", head: "Since" },
  { key: "role", head: "Role" },
];

function state(person: PersonItem): string {
  if (person.closedAt) return `closed ${formatDate(person.closedAt)}`;
  return formatDate(person.createdAt);
}

/** One row a person, with the role to give, change or take. */
export function PeopleTable({ page, query, ownId }: { page: PeoplePage; query: PeopleQuery; ownId: string }) {
  if (page.items.length === 0) return <EmptyState title="Nobody fits">Ask for less, or for any role.</EmptyState>;
  const next = new URLSearchParams({
    ...(query.contains && { contains: query.contains }),
    ...(query.role && { role: query.role }),
    ...(page.next !== null && { after: page.next }),
  });
  return (
    <>
      <BarsTable
        caption="People"
        phone="fold"
        columns={columns}
        rows={page.items.map((person) => ({
          key: person.personId,
          cells: {
            handle: { words: person.handle },
            email: { words: `${person.email}${person.verified ? "" : " (not confirmed)"}` },
            since: { words: state(person) },
            role: {
              words: person.closedAt ? (
                person.role
              ) : (
                <RoleForm key={person.role} person={person} own={person.personId === ownId} />
              ),
            },
          },
        }))}
      />
      {page.next === null ? null : (
        <p className="mt-4">
          <Link href={`/host/people?${next}`}>Further people</Link>
        </p>
      )}
    </>
  );
}
