import { appDb } from "@/db/client/handles";
import type { Handle } from "@/db/client/connect";
import { lockHosts, lockPerson, updatePerson } from "@/db/queries/people";
import { deletePersonal } from "@/db/queries/personal";
import type { Person } from "@/lib/domain/accounts/actor";
import { ExpectedError } from "@/lib/domain/expected-error";
import { note } from "../audit/audit";
import { demand } from "../permission";
import { checkOwnPassword } from "./password";
import { accountKey } from "./tokens";

/** Closes one's account: nobody can sign in to it; its designs and figures stay under its handle. */
export async function closeAccount(
  actor: Person,
  input: { currentPassword: string },
  requestId: string,
): Promise<void> {
  demand(actor, "account.own");
  await checkOwnPassword(actor, input.currentPassword);
  const { personId } = actor;
  await appDb().transaction(async (trx) => {
    await keepAHost(trx, personId);
    await updatePerson(trx, { personId, change: { closedAt: new Date(), endSessions: true } });
    await note(trx, { actor, requestId }, { action: "person.close", subjectKind: "person", subjectId: personId });
  });
}

/**
 * Closes one's account and cuts its name: rows that others rely on stay, with an id that names nobody; what was the
 * person's alone is deleted.
 *
 * @param input.handle one's own handle typed out, so that it isn't done by a slip
 */
export async function eraseAccount(
  actor: Person,
  input: { currentPassword: string; handle: string },
  requestId: string,
): Promise<void> {
  demand(actor, "account.own");
  if (input.handle.toLowerCase() !== actor.handle.toLowerCase()) {
    throw new ExpectedError("malformed", "Type your own handle to have your name cut.", [
      { path: "handle", message: "isn't your handle" },
    ]);
  }
  await checkOwnPassword(actor, input.currentPassword);
  const { personId } = actor;
  await appDb().transaction(async (trx) => {
    await keepAHost(trx, personId);
    const person = await lockPerson(trx, { personId });
    if (!person?.email) throw new ExpectedError("gone", "This account was erased already.");
    await deletePersonal(trx, { personId, accountKey: accountKey(person.email) });
    const now = new Date();
    const change = { email: null, handle: null, passwordHash: null, closedAt: now, erasedAt: now, endSessions: true };
    await updatePerson(trx, { personId, change });
    await note(trx, { actor, requestId }, { action: "person.erase", subjectKind: "person", subjectId: personId });
  });
}

/**
 * Refuses to take the last host away. Locks the hosts, so that the last two can't leave at the same time.
 *
 * @throws ExpectedError `moved_on`
 */
export async function keepAHost(trx: Handle, leavingId: string): Promise<void> {
  const hosts = await lockHosts(trx);
  if (hosts.length === 1 && hosts[0] === leavingId) {
    throw new ExpectedError("moved_on", "This is the last host. Make somebody else host first.");
  }
}
