/** The roles that a host gives, changes and takes. Owning a design is not a role. */
export const ROLES = ["member", "operator", "host"] as const;
export type Role = (typeof ROLES)[number];

/** Somebody signed in. */
export type Person = { readonly personId: string; readonly handle: string; readonly role: Role };

/** Who asks: a person, or somebody signed out. */
export type Actor = Person | { readonly role: "anonymous" };

export const ANONYMOUS: Actor = { role: "anonymous" };

/** Whether the actor is signed in. */
export function isPerson(actor: Actor): actor is Person {
  return actor.role !== "anonymous";
}
