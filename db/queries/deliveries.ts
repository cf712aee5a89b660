import type { Handle } from "../client/connect";

export interface DeliveryRow {
  id: number;
  eventId: number;
  consumer: string;
  target: string;
  attempts: number;
  kind: string;
  subject: Record<string, unknown>;
}

const columns = `d.id, d.event_id as "eventId", d.consumer, d.target, d.attempts, e.kind, e.subject`;

/**
 * Takes the next waiting delivery of these consumers and notes that it is begun; no other worker takes it from then on.
 * Workers that look at once pass each other by.
 */
export async function beginDelivery(
  db: Handle,
  { consumers, now }: { consumers: readonly string[]; now: Date },
): Promise<DeliveryRow | undefined> {
  const { rows }: { rows: DeliveryRow[] } = await db.raw(
    `update delivery d set begun_at = :now from event e
     where e.id = d.event_id and d.id = (
       select w.id from delivery w
       where w.state = 'waiting' and w.begun_at is null and w.next_at <= :now and w.consumer = any (:consumers)
       order by w.next_at, w.id limit 1 for update skip locked)
     returning ${columns}`,
    { consumers: [...consumers], now },
  );
  return rows[0];
}

/**
 * Settles deliveries that were begun before a moment and of which nothing was heard. One with a target may have reached
 * it: it is given up with a note. One without only makes others, once however often it is tried: it waits again.
 * @returns how many were given up
 */
export async function settleBroken(
  db: Handle,
  { begunBefore, note }: { begunBefore: Date; note: string },
): Promise<number> {
  const broken = () => db("delivery").where({ state: "waiting" }).where("begun_at", "<", begunBefore);
  await broken().where({ target: "" }).update({ begun_at: null });
  return broken()
    .whereNot({ target: "" })
    .update({ state: "failed", attempts: db.raw("attempts + 1"), last_error: note });
}

export async function markSent(db: Handle, { deliveryId, at }: { deliveryId: number; at: Date }): Promise<void> {
  await db("delivery").where({ id: deliveryId }).update({ state: "sent", sent_at: at, last_error: null });
}

/** Puts a delivery off, or gives it up: what failed too often waits for a person. */
export async function markFailed(
  db: Handle,
  { deliveryId, error, nextAt }: { deliveryId: number; error: string; nextAt: Date | null },
): Promise<void> {
  await db("delivery")
    .where({ id: deliveryId })
    .update({
      state: nextAt ? "waiting" : "failed",
      attempts: db.raw("attempts + 1"),
      last_error: error.slice(0, 500),
      begun_at: null,
      ...(nextAt && { next_at: nextAt }),
    });
}

/** Adds one delivery a target of the same event and consumer; targets that have one keep it. */
export async function addTargets(
  db: Handle,
  { eventId, consumer, targets }: { eventId: number; consumer: string; targets: readonly string[] },
): Promise<void> {
  if (targets.length === 0) return;
  await db("delivery")
    .insert(targets.map((target) => ({ event_id: eventId, consumer, target })))
    .onConflict(["event_id", "consumer", "target"])
    .ignore();
}

/** People to be told by mail that a round was published: owners of its entries and watchers of its designs, who want it. */
export async function peopleToTell(db: Handle, { roundId }: { roundId: string }): Promise<string[]> {
  const { rows }: { rows: { id: string }[] } = await db.raw(
    `select distinct p.id from published_entry e
       join lateral (
         select o.person_id, 'entry_state' as topic from design_owner o where o.design_id = e.design_id and o.until_at is null
         union select w.person_id, 'watched' from watch w where w.design_id = e.design_id) t on true
       join person p on p.id = t.person_id
     where e.round_id = :roundId and p.closed_at is null and p.email_verified_at is not null and p.password_hash is not null
       and coalesce((select c.wanted from mail_choice c where c.person_id = p.id and c.topic = t.topic), true)
     order by p.id`,
    { roundId },
  );
  return rows.map((row) => row.id);
}

/** What a letter about a round says: where it goes, and the recipient's own or watched designs in it. */
export async function roundLetter(
  db: Handle,
  { roundId, personId }: { roundId: string; personId: string },
): Promise<
  | {
      email: string;
      season: string;
      seasonSlug: string;
      roundNumber: number;
      designs: { name: string; slug: string }[];
    }
  | undefined
> {
  const { rows } = await db.raw(
    `select p.email, s.title as season, s.slug as "seasonSlug", n.number as "roundNumber",
       (select jsonb_agg(jsonb_build_object('name', d.name, 'slug', d.slug) order by d.name)
         from published_entry e join design d on d.id = e.design_id where e.round_id = n.id and (
           exists (select 1 from design_owner o where o.design_id = d.id and o.person_id = p.id and o.until_at is null)
           or exists (select 1 from watch w where w.design_id = d.id and w.person_id = p.id))) as designs
     from person p, round n join season s on s.id = n.season_id
     where p.id = :personId and p.closed_at is null and p.email is not null and n.id = :roundId and n.state = 'published'`,
    { roundId, personId },
  );
  return rows[0];
}
