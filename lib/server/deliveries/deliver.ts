import { appDb } from "@/db/client/handles";
import type { Handle } from "@/db/client/connect";
import {
  addTargets,
  markFailed,
  markSent,
  nextDelivery,
  peopleToTell,
  roundLetter,
  type DeliveryRow,
} from "@/db/queries/deliveries";
import { siteOrigin } from "@/lib/env/site";
import { mailer } from "@/lib/services/mail/from-env";
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

/** Works one delivery that waits. @returns whether there was one */
export async function deliverNext(now: Date, db: Handle = appDb()): Promise<boolean> {
  return db.transaction(async (tx) => {
    const delivery = await nextDelivery(tx, { consumers: Object.keys(consumers), now });
    if (!delivery) return false;
    try {
      await tx.transaction(async (inner) => consumers[delivery.consumer]?.(inner, delivery));
      await markSent(tx, { deliveryId: delivery.id, at: now });
    } catch (error) {
      const message = error instanceof Error ? error.message : String(error);
      const later =
        delivery.attempts + 1 < attemptsMost ? new Date(now.getTime() + minute * 2 ** delivery.attempts) : null;
      await markFailed(tx, { deliveryId: delivery.id, error: message, nextAt: later });
      log().warn({ deliveryId: delivery.id, consumer: delivery.consumer, again: later }, "delivery failed");
    }
    return true;
  });
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

function rest(ms: number, signal: AbortSignal): Promise<void> {
  return new Promise((resolve) => {
    const timer = setTimeout(resolve, ms);
    signal.addEventListener("abort", () => (clearTimeout(timer), resolve()), { once: true });
  });
}
