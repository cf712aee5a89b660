import { SMTPServer } from "smtp-server";
import { afterAll, beforeAll, beforeEach, describe, expect, it } from "vitest";
import { adoptEnvironment } from "@/lib/env/env";
import { beginDelivery } from "@/db/queries/deliveries";
import { deliverNext } from "@/lib/server/deliveries/deliver";
import { publishDueRounds, scheduleRound } from "@/lib/server/publishing/schedule";
import { signRound } from "@/lib/server/review/sign-round";
import { asHost, asReviewer, makeBenchWorld, measureRound, type BenchWorld } from "../factories/measured-round";
import { setUpDatabase } from "../setup/database";

const db = setUpDatabase();
const minute = 60_000;
let world: BenchWorld;
let roundId: string;
let eventId: number;
let people: { id: string; email: string }[];

/** A mail server by smtp-server, not ours: what it took, and whom it refuses. */
const taken: string[] = [];
const refused = new Set<string>();
const server = new SMTPServer({
  authOptional: true,
  disabledCommands: ["STARTTLS", "AUTH"],
  onRcptTo: ({ address }, _session, callback) =>
    callback(refused.has(address) ? Object.assign(new Error("no such mailbox"), { responseCode: 550 }) : null),
  onData(stream, session, callback) {
    stream.resume();
    stream.on("end", () => {
      taken.push(...session.envelope.rcptTo.map(({ address }) => address));
      callback();
    });
  },
});

beforeAll(async () => {
  const port = await new Promise<number>((resolve) => {
    const listening = server.listen(0, "127.0.0.1", () => {
      const address = listening.address();
      resolve(typeof address === "object" && address ? address.port : 0);
    });
  });
  adoptEnvironment({ SMTP_URL: `smtp://127.0.0.1:${port}`, LOG_LEVEL: "silent" });
  world = await makeBenchWorld(db.owner);
  ({ roundId } = await measureRound(world, { number: 1 }));
  await signRound(asReviewer(world), { roundId, remark: "", at: new Date() });
  await scheduleRound(asHost(world), { roundId, publishAt: null, now: new Date() });
  await publishDueRounds(new Date(), undefined, 40);
  const event = await db.owner("event").where({ kind: "round.published" }).first("id");
  eventId = Number(event.id);
  // Five people who watch a design of the round; the owners of it have no address in this world.
  await db.owner("person").update({ email_verified_at: null });
  const design = await db.owner("published_entry").where({ round_id: roundId }).first("design_id");
  people = await db
    .owner("person")
    .insert([1, 2, 3, 4, 5].map((n) => ({ email: `w${n}@people.example`, handle: `watcher-${n}`, password_hash: "x" })))
    .returning(["id", "email"]);
  await db
    .owner("person")
    .whereIn(
      "id",
      people.map(({ id }) => id),
    )
    .update({ email_verified_at: new Date() });
  await db.owner("watch").insert(people.map(({ id }) => ({ person_id: id, design_id: design.design_id })));
});
afterAll(() => new Promise<void>((resolve) => server.close(() => resolve())));

beforeEach(async () => {
  taken.length = 0;
  refused.clear();
  await db.owner("delivery").delete();
  await db.owner("delivery").insert([
    { event_id: eventId, consumer: "feed" },
    { event_id: eventId, consumer: "mail" },
  ]);
});

const later = (minutes: number): Date => new Date(Date.now() + minutes * minute);
async function workAll(now: Date): Promise<number> {
  let worked = 0;
  while (await deliverNext(now)) worked += 1;
  return worked;
}
const rows = () => db.owner("delivery").where({ consumer: "mail" }).whereNot({ target: "" }).orderBy("id").select("*");
const emails = () => people.map(({ email }) => email).sort();

describe("deliveries of one event", () => {
  it("reach each person once when two workers work them at once", async () => {
    const worked = await Promise.all([workAll(later(1)), workAll(later(1)), workAll(later(1))]);
    await workAll(later(2));
    expect(taken.sort()).toEqual(emails());
    expect((await rows()).map(({ state, attempts }) => [state, attempts])).toEqual(people.map(() => ["sent", 0]));
    // The feed's, the event's own for mail, and one a person: none was worked twice.
    expect(worked.reduce((sum, each) => sum + each, 0)).toBe(2 + people.length);
    const waiting = await db.owner("delivery").where({ state: "waiting" });
    expect(waiting).toEqual([]);
  });

  it("to an address that fails wait longer each time and hold up nobody else, then are given up", async () => {
    const [first] = people;
    refused.add(String(first?.email));
    const start = later(1);
    await workAll(start);
    expect(taken.sort()).toEqual(emails().filter((email) => email !== first?.email));
    const failing = async () => (await rows()).find(({ target }) => target === first?.id);
    const waits: number[] = [];
    let now = start;
    for (let attempt = 1; (await failing())?.state === "waiting"; attempt++) {
      const row = await failing();
      expect(row?.attempts).toBe(attempt);
      expect(row?.last_error).toMatch(/no such mailbox/);
      expect(await workAll(new Date(row?.next_at.getTime() - 1))).toBe(0);
      waits.push((row?.next_at.getTime() - now.getTime()) / minute);
      now = row?.next_at;
      await workAll(now);
    }
    expect(waits).toEqual([1, 2, 4, 8, 16, 32, 64]);
    expect(await failing()).toMatchObject({ state: "failed", attempts: 8 });
    expect(await workAll(new Date(now.getTime() + 10_000 * minute))).toBe(0);
  });

  it("that broke off after sending and before noting it aren't sent again: the row says so", async () => {
    await db.owner.raw(`
      create function fault() returns trigger language plpgsql as $$ begin raise exception 'the server is gone'; end $$;
      create trigger fault before update on delivery for each row when (new.state = 'sent' and new.target <> '')
        execute function fault()`);
    await deliverNext(later(1));
    await deliverNext(later(1));
    for (const _person of people) await expect(deliverNext(later(1))).rejects.toThrow(/the server is gone/);
    await db.owner.raw("drop trigger fault on delivery; drop function fault()");
    expect(taken.sort()).toEqual(emails());
    expect(await workAll(later(30))).toBe(0);
    expect(taken).toHaveLength(people.length);
    for (const { state, last_error: note } of await rows()) {
      expect([state, note]).toEqual(["failed", expect.stringContaining("it may have arrived")]);
    }
  });

  it("that only make others are made up for when their worker is gone", async () => {
    await beginDelivery(db.app, { consumers: ["mail"], now: later(1) });
    expect(await workAll(later(2))).toBe(1);
    expect(taken).toEqual([]);
    await workAll(later(30));
    expect(taken.sort()).toEqual(emails());
  });
});
