import { beforeAll, describe, expect, it } from "vitest";
import { insertHolds, liftHoldRow } from "@/db/queries/holds";
import { signRound, sendBack } from "@/lib/server/review/sign-round";
import { readRoundForReview } from "@/lib/server/review/read-round";
import { readEntryForReview } from "@/lib/server/review/read-entry";
import { readReviewList } from "@/lib/server/review/review-access";
import { lendRound, takeOutEntry } from "@/lib/server/seasons/rounds";
import {
  asHost,
  asks,
  asOperator,
  asOwnerOf,
  asReviewer,
  makeBenchWorld,
  measureRound,
  type BenchWorld,
} from "../factories/measured-round";
import { setUpDatabase } from "../setup/database";

const db = setUpDatabase();
const at = new Date("2025-03-01T09:00:00Z");
let world: BenchWorld;
let roundId: string;
let sessionId: string;
let entryId: string;

beforeAll(async () => {
  world = await makeBenchWorld(db.owner);
  const made = await measureRound(world, { number: 1 });
  ({ roundId, sessionId } = made);
  entryId = made.entryIds[0] ?? "";
});

const sign = (by: ReturnType<typeof asks>, expectedSha256?: string) =>
  signRound(by, { roundId, remark: "", expectedSha256, at });
const stateOf = async () => (await db.owner("round").where({ id: roundId }).first("state"))?.state;

describe("before the hour a round's figures", () => {
  it("are closed to members, and to whoever owns an entry of it, also with a role", async () => {
    const reader = asks(world, "wrenreader");
    await expect(readRoundForReview(reader.actor, { roundId })).rejects.toMatchObject({ code: "forbidden" });
    for (const role of ["member", "operator", "host"] as const) {
      const owner = asOwnerOf(world, 1, role);
      await expect(readRoundForReview(owner.actor, { roundId })).rejects.toMatchObject({ code: "forbidden" });
      const reading = readEntryForReview(owner.actor, { roundId, entryId });
      await expect(reading).rejects.toMatchObject({ code: "forbidden" });
    }
    expect((await readReviewList(reader.actor)).items).toEqual([]);
  });

  it("open down to the raw readings for those who review", async () => {
    const round = await readRoundForReview(asReviewer(world).actor, { roundId });
    expect(round.whyNotSign).toEqual([]);
    expect(round.entries).toHaveLength(2);
    expect(round.standings.map((each) => each.ruleKind)).toEqual(["equal-noise", "plain-sum"]);
    const ofEntry = await readEntryForReview(asReviewer(world).actor, { roundId, entryId });
    const known = new Set(ofEntry.runs.flatMap((run) => run.readings.map((reading) => reading.readingId)));
    const points = ofEntry.entry.snapshot?.points ?? [];
    expect(points.length).toBeGreaterThan(0);
    for (const id of points.flatMap((point) => point.readingIds)) {
      expect(known.has(id) || ofEntry.sessionReadings.some((reading) => reading.readingId === id)).toBe(true);
    }
  });

  it("tell the operator who took the readings why they may not sign", async () => {
    const round = await readRoundForReview(asOperator(world).actor, { roundId });
    expect(round.mayReview).toBe(false);
    expect(round.whyNotSign).toEqual(["You took or typed a reading of this round: another person signs it."]);
  });
});

describe("a signature is refused", () => {
  it("to somebody signed out, to a member without the loan, to who took a reading, to who owned an entry", async () => {
    const signedOut = signRound({ actor: { role: "anonymous" }, requestId: null }, { roundId, remark: "", at });
    await expect(signedOut).rejects.toMatchObject({ code: "not_signed_in" });
    await expect(sign(asks(world, "wrenreader"))).rejects.toThrow("not lent to you");
    await expect(sign(asOperator(world))).rejects.toThrow("took or typed a reading");
    await expect(sign(asOwnerOf(world, 1, "operator"))).rejects.toThrow("own or owned an entry");
    expect(await stateOf()).toBe("in_review");
  });

  it("to an owner who gave the design away during the round", async () => {
    const owner = asOwnerOf(world, 1, "operator");
    const held = db.owner("design_owner").where({ person_id: owner.actor.personId });
    await held.clone().update({ until_at: new Date() });
    await expect(sign(owner)).rejects.toThrow("own or owned an entry");
    await held.clone().update({ until_at: null });
  });

  it("by the database itself, whatever the program says", async () => {
    const row = { round_id: roundId, verdict: "signed", signed_sha256: "0".repeat(64) };
    const byOperator = { ...row, reviewer_id: asOperator(world).actor.personId };
    await expect(db.app("review").insert(byOperator)).rejects.toMatchObject({ code: "42501" });
    const byReader = { ...row, reviewer_id: asks(world, "wrenreader").actor.personId };
    await expect(db.app("review").insert(byReader)).rejects.toMatchObject({ code: "42501" });
  });

  it("while a session is held, until another person lifts the hold", async () => {
    const finding = { code: "baseline", reason: "The baseline drifted by 0.9 dB", whatToDo: "Run it again." };
    await insertHolds(db.owner, { sessionId, findings: [finding], raisedBy: null, at });
    await expect(sign(asReviewer(world))).rejects.toThrow("held: The baseline drifted");
    const byHand = db.app("review").insert({
      round_id: roundId,
      verdict: "signed",
      signed_sha256: "0".repeat(64),
      reviewer_id: asReviewer(world).actor.personId,
    });
    await expect(byHand).rejects.toThrow("held session is not signed");
    const hold = await db.owner("session_hold").where({ session_id: sessionId }).first("id");
    const lift = { holdId: hold?.id, liftNote: "Run again, in its limits.", at };
    await expect(liftHoldRow(db.app, { ...lift, liftedBy: asOperator(world).actor.personId })).rejects.toThrow(
      "another person lifts",
    );
    expect(await liftHoldRow(db.app, { ...lift, liftedBy: asReviewer(world).actor.personId })).toBe(true);
  });

  it("when something changed since it was opened", async () => {
    await expect(sign(asReviewer(world), "0".repeat(64))).rejects.toThrow("changed since you opened it");
    expect(await stateOf()).toBe("in_review");
  });
});

describe("a loan", () => {
  it("goes to a member who has no part in the round, and to nobody else", async () => {
    const lend = (handle: string) => lendRound(asHost(world), { roundId, handle, at });
    await expect(lend("nobody-here")).rejects.toThrow("is nobody here");
    await expect(lend("secondlook")).rejects.toThrow("reviews without a loan");
    await expect(lend(asOwnerOf(world, 1).actor.handle)).rejects.toThrow("owned an entry");
    await expect(lendRound(asOperator(world), { roundId, handle: "wrenreader", at })).rejects.toMatchObject({
      code: "forbidden",
    });
    await lend("wrenreader");
    const reader = asks(world, "wrenreader");
    expect((await readReviewList(reader.actor)).items).toMatchObject([{ roundId, lent: true, closedWhy: null }]);
    expect((await readRoundForReview(reader.actor, { roundId })).whyNotSign).toEqual([]);
  });

  it("lets that member sign what is on screen; taking an entry out then returns the round to review", async () => {
    const reader = asks(world, "wrenreader");
    const { sha256 } = await readRoundForReview(reader.actor, { roundId });
    expect((await sign(reader, sha256)).sha256).toBe(sha256);
    expect(await stateOf()).toBe("signed");
    await takeOutEntry(asHost(world), { roundId, entryId, reason: "A blade was chipped.", at: new Date() });
    expect(await stateOf()).toBe("in_review");
    const round = await readRoundForReview(asReviewer(world).actor, { roundId });
    expect(round.sha256).not.toBe(sha256);
    expect(round.entries).toHaveLength(1);
    expect(round.changes.map((change) => change.what)).toContain("Taken out of the round: A blade was chipped.");
  });
});

it("sends entries back to the bench with their reasons, and only entries of the round", async () => {
  const [left] = (await readRoundForReview(asReviewer(world).actor, { roundId })).entries;
  const back = (id: string) =>
    sendBack(asReviewer(world), {
      roundId,
      remark: "See below.",
      entries: [{ entryId: id, reason: "No tie." }],
      at: new Date(),
    });
  await expect(back(entryId)).rejects.toMatchObject({ code: "malformed" });
  await back(left?.entryId ?? "");
  expect(await stateOf()).toBe("measuring");
  expect((await db.owner("entry").where({ id: left?.entryId }).first("state"))?.state).toBe("on_the_bench");
});
