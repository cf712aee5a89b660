import { beforeAll, describe, expect, it } from "vitest";
import { moveRound } from "@/db/queries/moves";
import { supersedeReading } from "@/lib/server/bench/session-readings";
import { recomputePublications, recomputeStandings } from "@/lib/server/publishing/recompute";
import { publishDueRounds, scheduleRound } from "@/lib/server/publishing/schedule";
import { sendBack, signRound } from "@/lib/server/review/sign-round";
import { moveEntryByHost } from "@/lib/server/seasons/move-entry";
import { takeOutEntry } from "@/lib/server/seasons/rounds";
import {
  asHost,
  asOperator,
  asOwnerOf,
  asReviewer,
  makeBenchWorld,
  measureRound,
  type BenchWorld,
} from "../factories/measured-round";
import { setUpDatabase } from "../setup/database";

const db = setUpDatabase();
const draws = 40;
let world: BenchWorld;
let roundId: string;
let sessionId: string;
let entryIds: string[];

beforeAll(async () => {
  world = await makeBenchWorld(db.owner);
  ({ roundId, sessionId, entryIds } = await measureRound(world, { number: 1 }));
});

const round = async (id = roundId) => db.owner("round").where({ id }).first("state", "publish_at");
const lastMove = async (id: string) =>
  db
    .owner("round_move")
    .where({ round_id: id })
    .orderBy([{ column: "at", order: "desc" }])
    .first("to_state", "reason");
const count = async (table: string) => Number((await db.owner(table).count({ n: "*" }).first())?.n);
const everything = async () =>
  Promise.all(["publication", "published_entry", "standing", "standing_row", "event", "delivery"].map(count));
const sign = (id = roundId) => signRound(asReviewer(world), { roundId: id, remark: "", at: new Date() });
const now = (id = roundId) => scheduleRound(asHost(world), { roundId: id, publishAt: null, now: new Date() });
const due = () => publishDueRounds(new Date(), undefined, draws);

describe("the hour of a round", () => {
  it("is set after the signature, by a host who owns no entry of it, and lies ahead", async () => {
    await expect(now()).rejects.toThrow("signed before it is published");
    await sign();
    const ahead = { roundId, publishAt: new Date(Date.now() + 3_600_000), now: new Date() };
    await expect(scheduleRound(asOwnerOf(world, 1, "host"), ahead)).rejects.toMatchObject({ code: "forbidden" });
    await expect(scheduleRound(asReviewer(world), ahead)).rejects.toMatchObject({ code: "forbidden" });
    const past = { ...ahead, publishAt: new Date(Date.now() - 1_000) };
    await expect(scheduleRound(asHost(world), past)).rejects.toMatchObject({ code: "malformed" });
    await scheduleRound(asHost(world), ahead);
    expect((await round())?.state).toBe("scheduled");
    expect(await due()).toEqual({ published: [], refused: [] });
    expect(await everything()).toEqual([0, 0, 0, 0, 0, 0]);
  });
});

describe("publishing", () => {
  it("leaves nothing of it behind when it fails half-way", async () => {
    await now();
    await db.owner.raw(`
      create function fault() returns trigger language plpgsql as $$ begin raise exception 'the disk is full'; end $$;
      create trigger fault before insert on standing_row for each row execute function fault()`);
    await expect(due()).rejects.toThrow("could not be published");
    expect(await everything()).toEqual([0, 0, 0, 0, 0, 0]);
    expect((await round())?.state).toBe("scheduled");
    await db.owner.raw(`drop trigger fault on standing_row; drop function fault()`);
  });

  it("is done once by two workers at once", async () => {
    const both = await Promise.all([due(), due()]);
    expect(both.flatMap((each) => each.published)).toEqual([roundId]);
    expect((await round())?.state).toBe("published");
    // Two entries; a standing of the round and one of the season, by the season's rule and by the plain sum.
    expect(await everything()).toEqual([2, 2, 4, 8, 1, 2]);
    expect(await due()).toEqual({ published: [], refused: [] });
  });

  it("gives the same digests when it is computed again from the raw readings", async () => {
    const again = [await recomputePublications(db.owner), await recomputeStandings(db.owner)];
    expect(again).toEqual([
      { what: "publications", same: 2, filled: 0, differing: [] },
      { what: "standings", same: 4, filled: 0, differing: [] },
    ]);
  });

  it("closes the round: nothing is taken out of it, and its readings change by a correction alone", async () => {
    const out = takeOutEntry(asHost(world), {
      roundId,
      entryId: entryIds[0] ?? "",
      reason: "Too late.",
      at: new Date(),
    });
    await expect(out).rejects.toThrow("is withdrawn, not taken out");
    const reading = await db.owner("reading").where({ session_id: sessionId, quantity: "level_dba" }).first("id");
    const change = supersedeReading(asOperator(world), { readingId: reading?.id, value: 44.4, reason: "Misread." });
    await expect(change).rejects.toMatchObject({ code: "moved_on" });
  });
});

describe("an entry that was published", () => {
  it("is measured again, or withdrawn with a stub; it is neither carried over nor declined", async () => {
    const [again = "", gone = ""] = entryIds;
    const move = (entryId: string, to: object) =>
      moveEntryByHost(asHost(world), { entryId, move: { from: "published", ...to } as never, at: new Date() });
    await expect(move(gone, { to: "carried_over", seasonId: world.season.id })).rejects.toMatchObject({
      code: "moved_on",
    });
    await expect(move(gone, { to: "declined", reason: "No." })).rejects.toMatchObject({ code: "moved_on" });
    await move(again, { to: "on_the_bench" });
    expect(await db.public("shown.entry").where({ entry_id: again }).select("entry_id")).toHaveLength(1);
    await move(gone, { to: "withdrawn", reason: "Its designer asked for it." });
    expect(await db.public("shown.entry").where({ entry_id: gone }).select("entry_id")).toEqual([]);
    expect(await db.public("shown.withdrawal").where({ entry_id: gone }).select("reason")).toEqual([
      { reason: "Its designer asked for it." },
    ]);
    expect(await db.public("shown.publication").where({ entry_id: gone }).select("id")).toEqual([]);
  });
});

describe("what was signed", () => {
  it("goes back to review when a reading of it changes", async () => {
    const made = await measureRound(world, { number: 2 });
    const [kept = "", out = ""] = made.entryIds;
    const back = [{ entryId: out, reason: "The tie came loose." }];
    await sendBack(asReviewer(world), { roundId: made.roundId, remark: "One entry.", entries: back, at: new Date() });
    await takeOutEntry(asHost(world), { roundId: made.roundId, entryId: out, reason: "Next round.", at: new Date() });
    await moveRound(db.owner, { roundId: made.roundId, from: "measuring", to: "in_review", byPerson: null });
    await sign(made.roundId);
    const ofBaseline = await db
      .owner("reading as r")
      .join("run as u", "u.id", "r.run_id")
      .where({ "r.session_id": made.sessionId, "r.quantity": "level_dba" })
      .whereNotNull("u.baseline_unit_id")
      .first("r.id");
    await supersedeReading(asOperator(world), { readingId: ofBaseline?.id, value: 41.2, reason: "Misread by 1 dB." });
    expect((await round(made.roundId))?.state).toBe("in_review");
    expect(await lastMove(made.roundId)).toEqual({
      to_state: "in_review",
      reason: "A reading changed: Misread by 1 dB.",
    });
    expect(kept).not.toBe("");
  });

  it("is compared again at the hour: a digest that differs publishes nothing and returns the round", async () => {
    const made = await measureRound(world, { number: 3 });
    await sign(made.roundId);
    await now(made.roundId);
    // Behind the program's back, as a fault would do it.
    await db.owner.raw(`alter table run disable trigger user`);
    await db.owner("run").where({ session_id: made.sessionId, mount_number: 3 }).whereNotNull("entry_id").update({
      state: "discarded",
      reason: "fault",
    });
    await db.owner.raw(`alter table run enable trigger user`);
    const before = await everything();
    const { published, refused } = await due();
    expect(published).toEqual([]);
    expect(refused.map((each) => each.roundId)).toEqual([made.roundId]);
    expect(await everything()).toEqual(before);
    expect(await round(made.roundId)).toMatchObject({ state: "in_review", publish_at: null });
  });
});
