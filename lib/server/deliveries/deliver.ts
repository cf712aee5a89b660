import { appDb } from "@/db/client/handles";
import type { Handle } from "@/db/client/connect";
import {
  addTargets,
  beginDelivery,
  settleBroken,
  markFailed,
  markSent,
  peopleToTell,
  roundLetter,
  type DeliveryRow,
} from "@/db/queries/deliveries";
import { siteOrigin } from "@/lib/env/site";
import { mailer } from "@/lib/services/mail/from-env";
import { rest } from "../jobs/rest";
import { log } from "../log";

const attemptsMost = 8;
const minute = 60_000;

/** What each consumer does with one delivery. The feed is read from the database, so there is nothing to send for it. */
const consumers: Record<string, (tx: Handle, delivery: DeliveryRow) => Promise<void>> = {
  feed: async () => undefined,
  mail: deliverMail,
};

/**
 * A delivery without a target is the event itself: it becomes one delivery a person, so that one address that fails
 * holds up nobody else and nobody is written to twice.
 */
async function deliverMail(tx: Handle, { eventId, consumer, target, kind, subject }: DeliveryRow): Promise<void> {
  if (kind !== "round.published" || typeof subject.roundId !== "string") return;
  const { roundId } = subject;
  if (target === "") {
    await addTargets(tx, { eventId, consumer, targets: await peopleToTell(tx, { roundId }) });
    return;
  }
  const letter = await roundLetter(tx, { roundId, personId: target });
  if (!letter) return;
  const lines = letter.designs.map(({ name, slug }) => `${name}: ${siteOrigin()}/designs/${slug}`);
  await mailer().send({
    to: letter.email,
    subject: `${letter.season}, round ${letter.roundNumber} is published`,
    text: [
      `${letter.season}, round ${letter.roundNumber} is published:`,
      `${siteOrigin()}/seasons/${letter.seasonSlug}/rounds/${letter.roundNumber}`,
      "",
      ...lines,
      "",
      `What you are told by mail is yours to choose: ${siteOrigin()}/my/account`,
    ].join("\n"),
  });
}

/** A letter that was begun this long ago and never noted belongs to a worker that is no more; sending has its own limits. */
const silenceMaxMs = 15 * minute;
const broken = "A worker stopped between sending and noting it: it may have arrived, so it isn't sent again.";

/** Works one delivery that waits. @returns whether there was one */
export async function deliverNext(now: Date, db: Handle = appDb()): Promise<boolean> {
  const given = await settleBroken(db, { begunBefore: new Date(now.getTime() - silenceMaxMs), note: broken });
  if (given > 0) log().warn({ given }, "deliveries that broke off");
  const delivery = await beginDelivery(db, { consumers: Object.keys(consumers), now });
  if (!delivery) return false;
  try {
    await db.transaction(async (tx) => consumers[delivery.consumer]?.(tx, delivery));
  } catch (error) {
    const message = error instanceof Error ? error.message : String(error);
    const again =
      delivery.attempts + 1 < attemptsMost ? new Date(now.getTime() + minute * 2 ** delivery.attempts) : null;
    await markFailed(db, { deliveryId: delivery.id, error: message, nextAt: again });
    log().warn({ deliveryId: delivery.id, consumer: delivery.consumer, again }, "delivery failed");
    return true;
  }
  // Were this to fail the letter is out all the same: it must not look like one that failed.
  await markSent(db, { deliveryId: delivery.id, at: now });
  return true;
}

const pollMs = 5_000;

/** Works deliveries until told to stop; idle, it looks again every five seconds. Any number of workers may run it. */
export async function deliveryLoop(signal: AbortSignal): Promise<void> {
  while (!signal.aborted) {
    const worked = await deliverNext(new Date()).catch((error: unknown) => {
      log().error({ err: error }, "deliveries");
      return false;
    });
    if (!worked) await rest(pollMs, signal);
  }
}
