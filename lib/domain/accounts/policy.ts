import { isPerson, type Actor, type Role } from "./actor";

type Grant = {
  /** Roles that hold the permission; "anonymous" stands for anybody, signed in or not. */
  readonly roles: readonly (Role | "anonymous")[];
  /** Owning or co-owning the design in question gives a signed-in person this right, whatever the role. */
  readonly owner?: true;
  /** Closed to an operator or host who owns or co-owned an entry of the round in question. */
  readonly notOwnRound?: true;
};

const EVERYONE = ["anonymous", "member", "operator", "host"] as const;
const SIGNED_IN = ["member", "operator", "host"] as const;
const STAFF = ["operator", "host"] as const;
const HOST = ["host"] as const;

/** The role policy. Signing a round or a correction isn't here: it hangs on what was done, see `signing.ts`. */
export const POLICY = {
  "published.read": { roles: EVERYONE },
  "account.own": { roles: SIGNED_IN },
  "comparison.own": { roles: SIGNED_IN },
  "upload.create": { roles: SIGNED_IN },
  "question.ask": { roles: SIGNED_IN },
  "ballot.vote": { roles: SIGNED_IN },
  "design.create": { roles: SIGNED_IN },
  "design.read": { roles: STAFF, owner: true },
  "design.edit": { roles: [], owner: true },
  "design.owners": { roles: [], owner: true },
  "entry.send": { roles: [], owner: true },
  "entry.withdraw": { roles: HOST, owner: true },
  "entry.state": { roles: STAFF, owner: true },
  "entry.judge": { roles: HOST },
  "entry.carry": { roles: HOST },
  "entry.remeasure": { roles: HOST },
  "bench.read": { roles: STAFF },
  "bench.work": { roles: STAFF, notOwnRound: true },
  "print.work": { roles: STAFF },
  "session.lift": { roles: STAFF },
  "round.figures": { roles: STAFF, notOwnRound: true },
  "round.plan": { roles: HOST },
  "round.lend": { roles: HOST },
  "round.publish": { roles: HOST, notOwnRound: true },
  "question.answer": { roles: STAFF },
  "correction.write": { roles: STAFF },
  "season.manage": { roles: HOST },
  "rule.manage": { roles: HOST },
  "ballot.manage": { roles: HOST },
  "bench.manage": { roles: HOST },
  "baseline.manage": { roles: HOST },
  "people.manage": { roles: HOST },
  "audit.read": { roles: HOST },
  "webhook.manage": { roles: HOST },
  "takedown.make": { roles: HOST },
} as const satisfies Record<string, Grant>;
export type Permission = keyof typeof POLICY;
export const PERMISSIONS = Object.keys(POLICY) as Permission[];

/** What the stored rows say about the actor; a fact that wasn't looked up is left out and never helps. */
export type PolicyContext = {
  /** Owns or co-owns, today, the design in question. */
  readonly ownsDesign?: boolean;
  /** Owned or co-owned an entry of the round in question at any time of the round. */
  readonly ownedInRound?: boolean;
};

/**
 * Whether an actor holds a permission on what the context describes.
 * A permission with `notOwnRound` needs `ownedInRound` looked up: undefined refuses, so that a forgotten look-up fails
 * closed.
 */
export function may(actor: Actor, permission: Permission, context: PolicyContext = {}): boolean {
  const grant: Grant = POLICY[permission];
  if (grant.roles.includes("anonymous")) return true;
  if (!isPerson(actor)) return false;
  if (grant.owner && context.ownsDesign === true) return true;
  if (!grant.roles.includes(actor.role)) return false;
  return grant.notOwnRound ? context.ownedInRound === false : true;
}
