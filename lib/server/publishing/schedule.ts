import { appDb } from "@/db/client/handles";
import type { Handle } from "@/db/client/connect";
import { moveRound } from "@/db/queries/moves";
import { signingFacts } from "@/db/queries/review";
import { roundContext } from "@/db/queries/round-context";
import { dueRounds, setPublishAt } from "@/db/queries/schedule";
import { isPerson } from "@/lib/domain/accounts/actor";
import { ExpectedError } from "@/lib/domain/expected-error";
import { note, type Asked } from "../audit/audit";
import { demand } from "../permission";
import { returnSignedRound } from "../review/return-to-review";
import { publishRound, type PublishedRound } from "./publish-round";

/**
 * Sets the hour of a signed round; without one, that is now, and the worker publishes it as its next work: standings
 * take longer than a request should. The host does it, and no host who owns an entry of the round.
 */
export async function scheduleRound(
  asked: Asked,
  { roundId, publishAt, now }: { roundId: string; publishAt: Date | null; now: Date },
  db: Handle = appDb(),
): Promise<{ publishAt: Date }> {
  const { actor } = asked;
  const facts = isPerson(actor) ? await signingFacts(db, { roundId, personId: actor.personId }) : undefined;
  demand(actor, "round.publish", { ownedInRound: facts?.ownedInRound });
  if (publishAt !== null && publishAt.getTime() <= now.getTime()) {
    throw new ExpectedError("malformed", "The hour lies in the past.", [
      { path: "publishAt", message: "lies in the past" },
    ]);
  }
  const hour = publishAt ?? now;
  await db.transaction(async (tx) => {
    const round = await roundContext(tx, { roundId, lock: true });
    if (round.state !== "signed" && round.state !== "scheduled") {
      const state = round.state.replaceAll("_", " ");
      throw new ExpectedError("moved_on", `The round is ${state}: it is signed before it is published.`);
    }
    await setPublishAt(tx, { roundId, publishAt: hour });
    if (round.state === "signed") {
      await moveRound(tx, { roundId, from: "signed", to: "scheduled", byPerson: actor.personId, at: now });
    }
    await note(tx, asked, {
      action: "round.schedule",
      subjectKind: "round",
      subjectId: roundId,
      after: { publishAt: hour },
    });
  });
  return { publishAt: hour };
}

/** Publishes in one transaction; when what was signed has changed, sends the round back to review and says so. */
async function publishOrReturn(
  asked: Asked,
  { roundId, now, draws }: { roundId: string; now: Date; draws?: number },
  db: Handle,
): Promise<PublishedRound> {
  try {
    return await db.transaction((tx) => publishRound(tx, asked, { roundId, at: now, draws }));
  } catch (error) {
    if (error instanceof ExpectedError && error.code === "moved_on") {
      await db.transaction((tx) => returnSignedRound(tx, { roundId, reason: error.detail, at: now }));
    }
    throw error;
  }
}

/**
 * Publishes every round whose hour has come; the worker's clock calls it. Two workers at once do nothing twice: the
 * round's row is locked and its state looked at again. One round's fault doesn't keep the others from their hour.
 *
 * @param draws simulated rounds of the standings; the usual number where left out
 * @returns ids of the rounds that were published, and of those that were not, with the reason
 * @throws AggregateError of the faults that are nobody's mistake, after all rounds were tried
 */
export async function publishDueRounds(
  now: Date,
  db: Handle = appDb(),
  draws?: number,
): Promise<{ published: string[]; refused: { roundId: string; reason: string }[] }> {
  const published: string[] = [];
  const refused: { roundId: string; reason: string }[] = [];
  const faults: unknown[] = [];
  for (const roundId of await dueRounds(db, { now })) {
    try {
      await publishOrReturn({ actor: { role: "anonymous" }, requestId: null }, { roundId, now, draws }, db);
      published.push(roundId);
    } catch (error) {
      if (error instanceof ExpectedError) refused.push({ roundId, reason: error.detail });
      else faults.push(error);
    }
  }
  if (faults.length > 0) throw new AggregateError(faults, `${faults.length} rounds could not be published`);
  return { published, refused };
}
