import { appDb } from "@/db/client/handles";
import { lockPerson, personByEmail, personById, updatePerson } from "@/db/queries/people";
import { ANONYMOUS, type Person } from "@/lib/domain/accounts/actor";
import { comparableEmail } from "@/lib/domain/accounts/credentials";
import { ExpectedError } from "@/lib/domain/expected-error";
import { note } from "../audit/audit";
import { newAddressLetter, oldAddressLetter, post } from "./letters";
import { checkOwnPassword } from "./password";
import { inBackground } from "./sign-up";
import { issueToken, spendToken } from "./tokens";

/**
 * Sends a link to the address that somebody wants, and word of it to the one that they have. An address that another
 * account has gets no link and the same answer.
 */
export async function askForNewEmail(actor: Person, input: { email: string; currentPassword: string }): Promise<void> {
  await checkOwnPassword(actor, input.currentPassword);
  void inBackground(async () => {
    const person = await personById(appDb(), { personId: actor.personId });
    if (!person?.email || comparableEmail(person.email) === comparableEmail(input.email)) return;
    void post(oldAddressLetter(person.email));
    if (await personByEmail(appDb(), { email: input.email })) return;
    const token = await appDb().transaction((trx) =>
      issueToken(trx, { personId: actor.personId, purpose: "change_email", newEmail: input.email }),
    );
    await post(newAddressLetter(input.email, token));
  });
}

/** Takes the new address by its link's token. Throws `gone` when the token is spent or the address was taken meanwhile. */
export async function confirmNewEmail({ token, requestId }: { token: string; requestId: string }): Promise<void> {
  await appDb().transaction(async (trx) => {
    const { personId, newEmail } = await spendToken(trx, { token, purpose: "change_email" });
    const person = await lockPerson(trx, { personId });
    if (!person || person.closedAt || newEmail === null || (await personByEmail(trx, { email: newEmail }))) {
      throw new ExpectedError("gone", "This address can't be used for the account any more.");
    }
    await updatePerson(trx, { personId, change: { email: newEmail, emailVerifiedAt: new Date() } });
    const asked = { actor: ANONYMOUS, requestId };
    await note(trx, asked, { action: "person.email", subjectKind: "person", subjectId: personId });
  });
}
