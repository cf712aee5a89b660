import { appDb } from "@/db/client/handles";
import { listPeople, lockPerson, updatePerson, type PersonRow } from "@/db/queries/people";
import type { PeoplePage, PeopleQuery, PersonItem } from "@/lib/contracts/people";
import type { Actor, Role } from "@/lib/domain/accounts/actor";
import { ExpectedError } from "@/lib/domain/expected-error";
import { note } from "../audit/audit";
import { cutPage } from "../cut-page";
import { demand } from "../permission";
import { keepAHost } from "./leave";

function personItem(row: PersonRow): PersonItem {
  return {
    personId: row.personId,
    handle: row.handle ?? "",
    email: row.email ?? "",
    role: row.role,
    verified: row.emailVerifiedAt !== null,
    createdAt: row.createdAt.toISOString(),
    closedAt: row.closedAt?.toISOString() ?? null,
  };
}

/** People for the host, by handle. */
export async function readPeople(actor: Actor, query: PeopleQuery): Promise<PeoplePage> {
  demand(actor, "people.manage");
  const limit = query.limit ?? 50;
  const rows = await listPeople(appDb(), {
    limit: limit + 1,
    ...(query.contains && { contains: query.contains }),
    ...(query.role && { role: query.role }),
    ...(query.after && { after: { handle: query.after } }),
  });
  const { page, next } = cutPage(rows, limit, ({ handle }) => handle);
  return { items: page.map(personItem), next };
}

/**
 * Gives, changes or takes a role; the person's sessions end at their next request.
 *
 * @throws ExpectedError `moved_on` when the role is no longer the one that the host saw, or it is the last host's
 */
export async function changeRole(
  actor: Actor,
  { personId, role, was }: { personId: string; role: Role; was: Role },
  requestId: string,
): Promise<PersonItem> {
  demand(actor, "people.manage");
  return appDb().transaction(async (trx) => {
    if (was === "host" && role !== "host") await keepAHost(trx, personId);
    const person = await lockPerson(trx, { personId });
    if (!person || person.erasedAt) throw new ExpectedError("not_found", "There is no such person.");
    if (person.closedAt) throw new ExpectedError("moved_on", "This account was closed.");
    if (person.role !== was) {
      throw new ExpectedError("moved_on", `The role is ${person.role} by now. Load the list again.`);
    }
    if (role === was) return personItem(person);
    await updatePerson(trx, { personId, change: { role, endSessions: true } });
    await note(
      trx,
      { actor, requestId },
      {
        action: "person.role",
        subjectKind: "person",
        subjectId: personId,
        before: { role: was },
        after: { role },
      },
    );
    return personItem({ ...person, role });
  });
}
