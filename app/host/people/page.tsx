import type { Metadata } from "next";
import { PeopleFilter } from "@/components/accounts/people-filter";
import { PeopleTable } from "@/components/accounts/people-table";
import { Section } from "@/components/ui/sheet";
import { orPageState, personForPage } from "@/lib/auth/page";
import { peopleQuery } from "@/lib/contracts/people";
import { readPeople } from "@/lib/server/accounts/people";

export const metadata: Metadata = { title: "People" };

const path = "/host/people";

export default async function PeoplePage({
  searchParams,
}: {
  searchParams: Promise<Record<string, string | string[] | undefined>>;
}) {
  const actor = await personForPage(path);
  const asked = Object.entries(await searchParams).filter(([, value]) => value !== "");
  const parsed = peopleQuery.safeParse(Object.fromEntries(asked));
  const query = parsed.success ? parsed.data : {};
  const page = await orPageState(readPeople(actor, query), path);
  return (
    <Section id="people" title="People" level={1}>
      <p className="mb-4 max-w-2xl">
        A member sends in and asks; an operator works the bench; a host plans, judges and publishes. A changed role
        signs the person out.
      </p>
      <PeopleFilter contains={query.contains ?? ""} role={query.role} />
      <PeopleTable page={page} query={query} ownId={actor.personId} />
    </Section>
  );
}
