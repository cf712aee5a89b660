import type { Handle } from "@/db/client/connect";
import { insertPerson } from "@/db/queries/people";
import type { Person, Role } from "@/lib/domain/accounts/actor";
import { hashPassword } from "@/lib/services/passwords/passwords";

export const testPassword = "slow mills turn at dawn";
let passwordHash: Promise<string> | undefined;

/** A person with a confirmed address and `testPassword`. */
export async function makePerson(
  handle: Handle,
  name: string,
  role: Role = "member",
): Promise<Person & { email: string }> {
  passwordHash ??= hashPassword(testPassword);
  const email = `${name}@people.example`;
  const hash = await passwordHash;
  const personId = await insertPerson(handle, {
    email,
    handle: name,
    passwordHash: hash,
    role,
    emailVerifiedAt: new Date(),
  });
  if (personId === undefined) throw new Error(`There is a ${name} already.`);
  return { personId, handle: name, role, email };
}
