import { appDb } from "@/db/client/handles";
import { deleteMailTokens } from "@/db/queries/mail-tokens";
import { lockPerson, passwordHashOf, personByEmail, updatePerson, type PersonRow } from "@/db/queries/people";
import type { Handle } from "@/db/client/connect";
import { ANONYMOUS, type Person } from "@/lib/domain/accounts/actor";
import { passwordProblem } from "@/lib/domain/accounts/credentials";
import { ExpectedError } from "@/lib/domain/expected-error";
import { hashPassword, passwordFits } from "@/lib/services/passwords/passwords";
import { note, type Asked } from "../audit/audit";
import { takeFromLimit } from "../throttle/limit";
import { changedPasswordLetter, post, resetLetter } from "./letters";
import { inBackground } from "./sign-up";
import { accountKey, issueToken, spendToken } from "./tokens";

/** Guesses at one's own password from within a session that may be somebody else's. */
const guessLimit = { name: "own_password", max: 10, windowS: 900 };

/**
 * Checks the password of somebody signed in before what can't be taken back.
 *
 * @throws ExpectedError `malformed` on the field `currentPassword`, `too_many`
 */
export async function checkOwnPassword(actor: Person, currentPassword: string): Promise<void> {
  await takeFromLimit(guessLimit, actor.personId);
  const stored = await passwordHashOf(appDb(), { personId: actor.personId });
  if (await passwordFits(stored, currentPassword)) return;
  throw new ExpectedError("malformed", "That isn't your password.", [
    { path: "currentPassword", message: "isn't your password" },
  ]);
}

/** Sets a new password and ends every session, this one too. */
export async function changePassword(
  actor: Person,
  input: { currentPassword: string; password: string },
  requestId: string,
): Promise<void> {
  await checkOwnPassword(actor, input.currentPassword);
  const passwordHash = await hashPassword(input.password);
  await appDb().transaction(async (trx) => {
    const person = await lockPerson(trx, { personId: actor.personId });
    await setPassword(trx, { person, password: input.password, passwordHash, asked: { actor, requestId } });
  });
}

/** Sends a link for a new password to an account's address; where there is no account, nothing, with the same answer. */
export async function askForReset({ email }: { email: string }): Promise<void> {
  await takeFromLimit({ name: "letter", max: 5, windowS: 3600 }, accountKey(email));
  void inBackground(async () => {
    const person = await personByEmail(appDb(), { email });
    if (!person?.email || person.closedAt) return;
    const { personId } = person;
    const token = await appDb().transaction((trx) => issueToken(trx, { personId, purpose: "reset" }));
    await post(resetLetter(person.email, token));
  });
}

/** Sets a new password by a link's token. Whoever has the link has the mailbox, so the address counts as confirmed. */
export async function resetPassword(input: { token: string; password: string; requestId: string }): Promise<void> {
  const passwordHash = await hashPassword(input.password);
  await appDb().transaction(async (trx) => {
    const { personId } = await spendToken(trx, { token: input.token, purpose: "reset" });
    const person = await lockPerson(trx, { personId });
    const asked = { actor: ANONYMOUS, requestId: input.requestId };
    await setPassword(trx, { person, password: input.password, passwordHash, asked });
    if (person && !person.emailVerifiedAt) {
      await updatePerson(trx, { personId, change: { emailVerifiedAt: new Date() } });
    }
  });
}

async function setPassword(
  trx: Handle,
  params: { person: PersonRow | undefined; password: string; passwordHash: string; asked: Asked },
): Promise<void> {
  const { person, passwordHash } = params;
  if (!person?.email || !person.handle || person.closedAt) throw new ExpectedError("gone", "This account was closed.");
  const problem = passwordProblem(params.password, { email: person.email, handle: person.handle });
  if (problem)
    throw new ExpectedError("malformed", `The password ${problem}.`, [{ path: "password", message: problem }]);
  const { personId } = person;
  await updatePerson(trx, { personId, change: { passwordHash, endSessions: true } });
  await deleteMailTokens(trx, { personId });
  await note(trx, params.asked, { action: "person.password", subjectKind: "person", subjectId: personId });
  void post(changedPasswordLetter(person.email));
}
