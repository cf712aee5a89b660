import { appDb } from "@/db/client/handles";
import type { Handle } from "@/db/client/connect";
import { moveRound } from "@/db/queries/moves";
import { dueRounds, setPublishAt } from "@/db/queries/schedule";
import { signingFacts } from "@/db/queries/review";
import { roundContext } from "@/db/queries/round-context";
import { isPerson } from "@/lib/domain/accounts/actor";
import { ExpectedError } from "@/lib/domain/expected-error";
import { note, type Asked } from "../audit/audit";
import { demand } from "../permission";
import { publishRound, type PublishedRound } from "./publish-round";

/**
 * Sets the hour of a signed round, or publishes it at once when no hour is given. The host does it, and no host who
 * owns an entry of the round.
 */
export async function scheduleRound(
  asked: Asked,
  { roundId, publishAt, now }: { roundId: string; publishAt: Date | null; now: Date },
  db: Handle = appDb(),
): Promise<{ published: PublishedRound | null }> {
  const { actor } = asked;
  const facts = isPerson(actor) ? await signingFacts(db, { roundId, personId: actor.personId }) : undefined;
  demand(actor, "round.publish", { ownedInRound: facts?.ownedInRound });
  if (publishAt !== null && publishAt.getTime() <= now.getTime()) {
    throw new ExpectedError("malformed", "The hour lies in the past.", [
      { path: "publishAt", message: "lies in the past" },
    ]);
  }
  await db.transaction(async (tx) => {
    const round = await roundContext(tx, { roundId, lock: true });
    if (round.state !== "signed" && round.state !== "scheduled") {
      throw new ExpectedError("moved_on", `The round is ${round.state}: it is signed before it is published.`);
    }
    await setPublishAt(tx, { roundId, publishAt });
    if (round.state === "signed") {
      await moveRound(tx, { roundId, from: "signed", to: "scheduled", byPerson: actor.personId, at: now });
    }
    await note(tx, asked, { action: "round.schedule", subjectKind: "round", subjectId: roundId, after: { publishAt } });
  });
  return { published: publishAt === null ? await publishOrReturn(asked, { roundId, now }, db) : null };
}

/** Publishes in one transaction; when what was signed has changed, sends the round back to review and says so. */
async function publishOrReturn(
  asked: Asked,
  { roundId, now }: { roundId: string; now: Date },
  db: Handle,
): Promise<PublishedRound> {
  try {
    return await db.transaction((tx) => publishRound(tx, asked, { roundId, at: now }));
  } catch (error) {
    if (error instanceof ExpectedError && error.code === "moved_on")
      await returnToReview(db, roundId, error.detail, now);
    throw error;
  }
}

async function returnToReview(db: Handle, roundId: string, reason: string, at: Date): Promise<void> {
  await db.transaction(async (tx) => {
    const round = await roundContext(tx, { roundId, lock: true });
    if (round.state !== "scheduled" && round.state !== "signed") return;
    await setPublishAt(tx, { roundId, publishAt: null });
    await moveRound(tx, { roundId, from: round.state, to: "in_review", byPerson: null, reason, at });
  });
}

/**
 * Publishes every round whose hour has come; the worker's clock calls it. Two workers at once do nothing twice: the
 * round's row is locked and its state looked at again.
 * @returns ids of the rounds that were published, and of those that were not, with the reason
 */
export async function publishDueRounds(
  now: Date,
  db: Handle = appDb(),
): Promise<{ published: string[]; refused: { roundId: string; reason: string }[] }> {
  const published: string[] = [];
  const refused: { roundId: string; reason: string }[] = [];
  for (const roundId of await dueRounds(db, { now })) {
    try {
      await publishOrReturn({ actor: { role: "anonymous" }, requestId: null }, { roundId, now }, db);
      published.push(roundId);
    } catch (error) {
      if (!(error instanceof ExpectedError)) throw error;
      refused.push({ roundId, reason: error.detail });
    }
  }
  return { published, refused };
}
