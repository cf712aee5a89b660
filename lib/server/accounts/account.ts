import { appDb } from "@/db/client/handles";
import { personByHandle, personById, updatePerson } from "@/db/queries/people";
import { mailChoicesOf, setMailChoices } from "@/db/queries/personal";
import { mailTopics, type Account, type MailChoices } from "@/lib/contracts/accounts";
import type { Actor, Person } from "@/lib/domain/accounts/actor";
import { ExpectedError } from "@/lib/domain/expected-error";
import { note } from "../audit/audit";
import { demand } from "../permission";
import { handleTaken } from "./sign-up";

/** One's own account, with every mail topic: what was never chosen is not wanted. */
export async function readAccount(actor: Actor): Promise<Account> {
  demand(actor, "account.own");
  const { personId } = actor;
  const [person, chosen] = await Promise.all([personById(appDb(), { personId }), mailChoicesOf(appDb(), { personId })]);
  if (!person?.email || !person.handle) throw new ExpectedError("gone", "This account was closed.");
  return {
    personId,
    email: person.email,
    handle: person.handle,
    role: person.role,
    createdAt: person.createdAt.toISOString(),
    mailChoices: Object.fromEntries(mailTopics.map((topic) => [topic, chosen.get(topic) ?? false])) as MailChoices,
  };
}

/** Takes another handle. The search index hears of it in the same transaction, by the table's trigger. */
export async function changeHandle(actor: Person, input: { handle: string }, requestId: string): Promise<void> {
  demand(actor, "account.own");
  const { personId } = actor;
  await appDb().transaction(async (trx) => {
    const holder = await personByHandle(trx, { handle: input.handle });
    if (holder?.personId === personId) return;
    if (holder) throw handleTaken();
    await updatePerson(trx, { personId, change: { handle: input.handle } });
    await note(trx, { actor, requestId }, { action: "person.handle", subjectKind: "person", subjectId: personId });
  });
}

/** Keeps what somebody wants to be told by mail. */
export async function chooseMail(actor: Person, choices: MailChoices): Promise<void> {
  demand(actor, "account.own");
  await setMailChoices(appDb(), { personId: actor.personId, choices });
}
