import { isPerson, type Actor, type Person } from "@/lib/domain/accounts/actor";
import { may, type Permission, type PolicyContext } from "@/lib/domain/accounts/policy";
import { ExpectedError } from "@/lib/domain/expected-error";

/**
 * Refuses an actor who lacks a permission on what the context says of the stored rows.
 *
 * @throws ExpectedError `not_signed_in` for somebody signed out, else `forbidden`
 */
export function demand(actor: Actor, permission: Permission, context: PolicyContext = {}): asserts actor is Person {
  if (may(actor, permission, context) && isPerson(actor)) return;
  if (!isPerson(actor)) throw new ExpectedError("not_signed_in", "Sign in first, then try again.");
  throw new ExpectedError("forbidden", "Your account may not do this.");
}
