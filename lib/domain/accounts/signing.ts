import { isPerson, type Actor } from "./actor";

/** What the stored rows say about one person and one round (or the rounds that a correction moves). */
export type SigningFacts = {
  /** The host lent this round to this member. */
  readonly lentToActor: boolean;
  /** Took or typed a reading of it, superseded ones too. */
  readonly tookReading: boolean;
  /** Owned or co-owned an entry of it at any time of the round. */
  readonly ownedInRound: boolean;
};

export type SigningRefusal = "signed_out" | "not_lent" | "took_a_reading" | "owned_an_entry";

/**
 * Who may sign a round or a correction: an operator or host, or the one member to whom the host lent that round; but
 * nobody who took or typed a reading of it, and nobody who owned or co-owned an entry of it at any time of the round.
 * Gives undefined when the actor may sign, else the first reason why not.
 */
export function whyNotSign(actor: Actor, facts: SigningFacts): SigningRefusal | undefined {
  if (!isPerson(actor)) return "signed_out";
  if (actor.role === "member" && !facts.lentToActor) return "not_lent";
  if (facts.tookReading) return "took_a_reading";
  if (facts.ownedInRound) return "owned_an_entry";
  return undefined;
}

/**
 * Whether an actor may work a run: an operator or host, but no owner of the entry that the run measures.
 * A run of the baseline has no owner: pass false.
 */
export function mayWorkRun(actor: Actor, ownedTheEntry: boolean): boolean {
  return isPerson(actor) && actor.role !== "member" && !ownedTheEntry;
}

/**
 * Whether an actor sees the figures of a round before the hour: an operator, a host, or the member to whom it was
 * lent; never somebody who owned an entry of it, whatever the role.
 */
export function maySeeFiguresBeforeTheHour(actor: Actor, facts: Omit<SigningFacts, "tookReading">): boolean {
  if (!isPerson(actor) || facts.ownedInRound) return false;
  return actor.role !== "member" || facts.lentToActor;
}

/** The parts in which an actor moves an entry: the role's, the designer's by owning, the reviewer's by the rule above. */
export function entryParts(
  actor: Actor,
  facts: SigningFacts & { readonly ownsDesign: boolean },
): readonly ("designer" | "operator" | "host" | "reviewer")[] {
  if (!isPerson(actor)) return [];
  return [
    ...(facts.ownsDesign ? (["designer"] as const) : []),
    ...(actor.role === "member" ? [] : [actor.role]),
    ...(whyNotSign(actor, facts) === undefined ? (["reviewer"] as const) : []),
  ];
}
