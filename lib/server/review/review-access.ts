import { appDb } from "@/db/client/handles";
import type { Handle } from "@/db/client/connect";
import { signingFacts } from "@/db/queries/review";
import { roundsBeforeTheHour } from "@/db/queries/review-rounds";
import { roundContext, type RoundContext } from "@/db/queries/round-context";
import type { ReviewListItem } from "@/lib/contracts/review";
import { isPerson, type Actor, type Person } from "@/lib/domain/accounts/actor";
import { maySeeFiguresBeforeTheHour } from "@/lib/domain/accounts/signing";
import { ExpectedError } from "@/lib/domain/expected-error";

const ownEntry = "You own or owned an entry of this round: its figures are closed to you before the hour.";

/**
 * A round for somebody who may see its figures before the hour: an operator or host, or the member to whom it was
 * lent; nobody who owned an entry of it.
 * @throws ExpectedError not_signed_in, forbidden with the reason, not_found
 */
export async function demandReviewRound(
  db: Handle,
  actor: Actor,
  roundId: string,
): Promise<{ person: Person; round: RoundContext }> {
  if (!isPerson(actor)) throw new ExpectedError("not_signed_in", "Sign in first, then try again.");
  const facts = await signingFacts(db, { roundId, personId: actor.personId });
  if (!maySeeFiguresBeforeTheHour(actor, facts)) {
    const words = facts.ownedInRound ? ownEntry : "This round was not lent to you for review.";
    throw new ExpectedError("forbidden", words);
  }
  return { person: actor, round: await roundContext(db, { roundId }) };
}

/** Rounds before their hour for those who review: all of them for operators and hosts, the lent ones for a member. */
export async function readReviewList(actor: Actor): Promise<{ items: ReviewListItem[] }> {
  if (!isPerson(actor)) throw new ExpectedError("not_signed_in", "Sign in first, then try again.");
  const rows = await roundsBeforeTheHour(appDb(), {
    personId: actor.personId,
    lentOnly: actor.role === "member",
  });
  return {
    items: rows.map(({ ownedInRound, publishAt, ...row }) => ({
      ...row,
      publishAt: publishAt?.toISOString() ?? null,
      closedWhy: ownedInRound ? ownEntry : null,
    })),
  };
}
