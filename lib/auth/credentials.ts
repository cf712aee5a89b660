import { createHash } from "node:crypto";
import { appDb } from "@/db/client/handles";
import { passwordHashOf, personByEmail } from "@/db/queries/people";
import { beginAttempt, countFailedAttempts, dropAttempt, markSucceeded } from "@/db/queries/throttle";
import { comparableEmail, passwordLengthMax } from "@/lib/domain/accounts/credentials";
import { passwordFits } from "@/lib/services/passwords/passwords";

/** House rule, no source: a quarter of an hour's failures on one account, and from one address over all accounts. */
const withinS = 900;
const failedOnAccountMax = 10;
const failedFromAddressMax = 100;

/** What the sign-in form is told; "wrong" covers an unknown address, a wrong password and a closed account alike. */
export type SignInRefusal = "wrong" | "too_many" | "not_verified";

export type SignIn = { ok: true; personId: string; sessionVersion: number } | { ok: false; why: SignInRefusal };

/**
 * Checks an address and a password. The attempt is on record before the password is looked at, so that many at once
 * can't slip past the count, and hashing is done whether or not there is such an account.
 */
export async function checkCredentials(params: { email: string; password: string; address: string }): Promise<SignIn> {
  const { address } = params;
  const email = comparableEmail(params.email);
  const accountKey = createHash("sha256").update(email).digest("hex");
  const attemptId = await beginAttempt(appDb(), { accountKey, address });
  const failed = await countFailedAttempts(appDb(), { accountKey, address, withinS });
  if (failed.failedOnAccount > failedOnAccountMax || failed.failedFromAddress > failedFromAddressMax) {
    await dropAttempt(appDb(), { attemptId });
    return { ok: false, why: "too_many" };
  }
  const person = await personByEmail(appDb(), { email });
  const stored = await passwordHashOf(appDb(), { personId: person?.personId ?? nobody });
  const fits = await passwordFits(stored, params.password.slice(0, passwordLengthMax));
  if (!person || !fits || person.closedAt || params.password.length > passwordLengthMax) {
    return { ok: false, why: "wrong" };
  }
  await markSucceeded(appDb(), { attemptId });
  if (!person.emailVerifiedAt) return { ok: false, why: "not_verified" };
  return { ok: true, personId: person.personId, sessionVersion: person.sessionVersion };
}

/** An id that no row has, so that the same queries run for an unknown address. */
const nobody = "00000000-0000-0000-0000-000000000000";
