import type { Handle } from "@/db/client/connect";
import { openHolds, openSessions, signingFacts } from "@/db/queries/review";
import type { RoundContext } from "@/db/queries/round-context";
import { isPerson, type Actor } from "@/lib/domain/accounts/actor";
import { whyNotSign, type SigningRefusal } from "@/lib/domain/accounts/signing";

export const signingRefusals: Record<SigningRefusal, string> = {
  signed_out: "Sign in first, then try again.",
  not_lent: "This round was not lent to you for review.",
  took_a_reading: "You took or typed a reading of this round: another person signs it.",
  owned_an_entry: "You own or owned an entry of this round: another person signs it.",
};

/** What keeps a round itself from being signed, whoever signs, each in words; empty when nothing does. */
export async function roundObstacles(db: Handle, round: RoundContext): Promise<string[]> {
  const { roundId } = round;
  const obstacles: string[] = [];
  if (round.state !== "in_review") obstacles.push(`The round is ${round.state.replaceAll("_", " ")}, not in review.`);
  for (const held of await openHolds(db, { roundId })) {
    obstacles.push(`A session of this round is held: ${held.reason}. Another person lifts it first.`);
  }
  if ((await openSessions(db, { roundId })).length > 0) {
    obstacles.push("A session of this round is still open at the bench.");
  }
  if (round.entries.length === 0) obstacles.push("The round has no entry.");
  const elsewhere = round.entries.filter((entry) => entry.state !== "in_review").length;
  if (round.state === "in_review" && elsewhere > 0) {
    obstacles.push(`${elsewhere} of its entries ${elsewhere === 1 ? "is" : "are"} not in review.`);
  }
  if (round.entries.some((entry) => entry.sessionId === null)) obstacles.push("An entry of the round has no figures.");
  return obstacles;
}

/** Why this person may not sign this round, whatever state it is in; undefined when they may. */
export async function personObstacle(db: Handle, actor: Actor, roundId: string): Promise<string | undefined> {
  if (!isPerson(actor)) return signingRefusals.signed_out;
  const refusal = whyNotSign(actor, await signingFacts(db, { roundId, personId: actor.personId }));
  return refusal && signingRefusals[refusal];
}
