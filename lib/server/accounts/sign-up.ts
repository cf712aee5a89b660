import { appDb } from "@/db/client/handles";
import type { Handle } from "@/db/client/connect";
import { insertPerson, lockHosts, lockPerson, personByEmail, personByHandle, updatePerson } from "@/db/queries/people";
import { ANONYMOUS } from "@/lib/domain/accounts/actor";
import { passwordProblem } from "@/lib/domain/accounts/credentials";
import { ExpectedError } from "@/lib/domain/expected-error";
import { env } from "@/lib/env/env";
import { hashPassword } from "@/lib/services/passwords/passwords";
import { note } from "../audit/audit";
import { log } from "../log";
import { takeFromLimit } from "../throttle/limit";
import { knownLetter, post, verifyLetter } from "./letters";
import { accountKey, issueToken, spendToken } from "./tokens";

/** Letters that one address gets at most, whoever asks for them. */
const letterLimit = { name: "letter", max: 5, windowS: 3600 };

/**
 * Makes an account that waits for its address to be confirmed. A known address gets the same answer after the same
 * work, and a letter that says so. A taken handle is told: handles are public.
 */
export async function signUp(input: { email: string; handle: string; password: string }): Promise<void> {
  const problem = passwordProblem(input.password, input);
  if (problem)
    throw new ExpectedError("malformed", `The password ${problem}.`, [{ path: "password", message: problem }]);
  await takeFromLimit(letterLimit, accountKey(input.email));
  const passwordHash = await hashPassword(input.password);
  if (await personByHandle(appDb(), { handle: input.handle })) throw handleTaken();
  const personId = await insertPerson(appDb(), { email: input.email, handle: input.handle, passwordHash });
  void (personId ? sendVerification(personId, input.email) : post(knownLetter(input.email)));
}

export function handleTaken(): ExpectedError {
  return new ExpectedError("already_there", "This handle is taken. Choose another.", [
    { path: "handle", message: "is taken" },
  ]);
}

/** Sends the confirming letter anew where an account waits for it; the answer is the same where none does. */
export async function sendVerificationAgain({ email }: { email: string }): Promise<void> {
  await takeFromLimit(letterLimit, accountKey(email));
  void inBackground(async () => {
    const person = await personByEmail(appDb(), { email });
    if (person && !person.closedAt && !person.emailVerifiedAt) await sendVerification(person.personId, email);
  });
}

async function sendVerification(personId: string, email: string): Promise<void> {
  await inBackground(async () => {
    const token = await appDb().transaction((trx) => issueToken(trx, { personId, purpose: "verify" }));
    await post(verifyLetter(email, token));
  });
}

/** Work whose length mustn't show in the answer. */
export async function inBackground(work: () => Promise<void>): Promise<void> {
  await work().catch((error: unknown) => log().error({ err: error }, "letter not sent"));
}

/** Confirms an account's address by the link's token. Throws `gone` for a spent one. */
export async function verifyEmail({ token, requestId }: { token: string; requestId: string }): Promise<void> {
  await appDb().transaction(async (trx) => {
    const { personId } = await spendToken(trx, { token, purpose: "verify" });
    const person = await lockPerson(trx, { personId });
    if (!person || person.closedAt) throw new ExpectedError("gone", "This account was closed.");
    if (person.emailVerifiedAt) return;
    await updatePerson(trx, { personId, change: { emailVerifiedAt: new Date() } });
    const asked = { actor: ANONYMOUS, requestId };
    await note(trx, asked, { action: "person.verify", subjectKind: "person", subjectId: personId });
    if (await isFirstHost(trx, person.email)) {
      await updatePerson(trx, { personId, change: { role: "host" } });
      const change = { before: { role: person.role }, after: { role: "host" } };
      await note(trx, asked, { action: "person.first_host", subjectKind: "person", subjectId: personId, ...change });
    }
  });
}

/**
 * Whether the settings name this address as the first host's and there is none yet. Only who reads its mail gets here:
 * the token of the letter was spent.
 */
async function isFirstHost(trx: Handle, email: string | null): Promise<boolean> {
  const named = env().FIRST_HOST_EMAIL?.toLowerCase();
  if (named === undefined || email?.toLowerCase() !== named) return false;
  return (await lockHosts(trx)).length === 0;
}
