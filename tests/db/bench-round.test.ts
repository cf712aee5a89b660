import { beforeAll, describe, expect, it } from "vitest";
import { benchSession } from "@/lib/contracts/bench-session";
import { benchQueue, printJobs } from "@/lib/contracts/bench-prints";
import { moveAtBench } from "@/lib/server/bench/entry-moves";
import { readPrintJobs, readQueue } from "@/lib/server/bench/queue";
import { readSession, readSessions } from "@/lib/server/bench/read-session";
import { roundToReview } from "@/lib/server/bench/round-to-review";
import { liftHold } from "@/lib/server/bench/session-readings";
import { endSession } from "@/lib/server/bench/sessions";
import { benchRoom, type BenchRoom } from "../factories/bench-room";
import { asked, calibrate, later, mount, openSession, readBackground, toTheBench, toy } from "../factories/bench-steps";
import { setUpDatabase } from "../setup/database";

const db = setUpDatabase();
let room: BenchRoom;
let sessionId: string;
const entryId = (n: number) => room.entries[n]?.entryId ?? "";

beforeAll(async () => {
  room = await benchRoom(db.owner);
});

describe("a round at the bench, from print to review", () => {
  it("shows what to print first, and who may not see it", async () => {
    const queue = benchQueue.parse(await readQueue(room.operator));
    expect(queue.entries.map(({ name, state, rotors }) => [name, state, rotors])).toEqual([
      ["Heronwing", "accepted", 1],
      ["Slow Mill", "accepted", 2],
    ]);
    expect(queue.rounds).toMatchObject([{ roundState: "planned", ready: false, benches: [{ number: 1 }] }]);
    await expect(readQueue(room.designer)).rejects.toMatchObject({ code: "forbidden" });
  });

  it("goes to the bench once every rotor of a copy has passed its spin-up", async () => {
    await toTheBench(room, entryId(0));
    await toTheBench(room, entryId(1));
    const jobs = printJobs.parse(await readPrintJobs(room.operator));
    expect(jobs.items.map(({ state, specimens }) => [state, specimens[0]?.parts.map((part) => part.state)])).toEqual([
      ["on_the_bench", ["passed"]],
      ["on_the_bench", ["passed", "passed"]],
    ]);
    expect(jobs.items[0]?.topSpeedRpm).toBe(1450);
  });

  it("names every missing run of a session that has just begun", async () => {
    sessionId = await openSession(room);
    const session = benchSession.parse(await readSession(room.operator, { sessionId }));
    expect(session.round).toMatchObject({ state: "measuring" });
    // The baseline first and last at two speeds; an entry in two mounts at two speeds.
    expect(session.subjects.map(({ missing }) => missing.length)).toEqual([4, 4, 4]);
    expect(new Set(session.gates.map((gate) => gate.code))).toEqual(
      new Set(["calibrator", "background", "ambient", "baseline"]),
    );
  });

  it("reckons figures as the runs come in", async () => {
    await calibrate(room, sessionId, "before");
    await readBackground(room, sessionId);
    await mount(room, sessionId, null, 1, toy());
    await mount(room, sessionId, entryId(0), 1, toy(4));
    const { figures, subjects } = benchSession.parse(await readSession(room.operator, { sessionId }));
    expect(subjects.map(({ missing }) => missing.length)).toEqual([2, 2, 4]);
    const entry = figures.find((each) => each.entryId === entryId(0) && each.setSpeed === 1100);
    // By hand: ΔT 62 − 4 − 22 = 36 K against 40 K at 150 W: ratio 0.9. Level 38 dB(A) over a background of 28 dB(A):
    // K1 = −10 lg(1 − 10^−1) = 0.458 dB (ISO 3744:2010, Eq. (16)); the same on both, so no difference.
    expect(entry).toMatchObject({ mounts: 1, atMost: false });
    expect(entry?.deltaTK).toBeCloseTo(36, 9);
    expect(entry?.resistanceKPerW).toBeCloseTo(36 / 150, 9);
    expect(entry?.correctionDb).toBeCloseTo(-10 * Math.log10(1 - 10 ** -1), 9);
    expect(entry?.resistanceRatio).toBeCloseTo(0.9, 9);
    expect(entry?.levelDifferenceDb).toBeCloseTo(0, 9);
  });

  it("doesn't go to review while runs are missing or the session is open, and says which", async () => {
    const toReview = { entryId: entryId(0), from: "on_the_bench", to: "in_review", at: later(90) } as const;
    await expect(moveAtBench(asked(room.operator), toReview)).rejects.toMatchObject({
      code: "moved_on",
      detail: expect.stringMatching(/still open.*2 runs are missing: mount 2 at 1100 rpm, mount 2 at 1450 rpm/),
    });
  });

  it("is held at its end by a calibrator that moved, until another person lifts the hold", async () => {
    await mount(room, sessionId, entryId(0), 2, toy(4));
    for (const number of [1, 2]) await mount(room, sessionId, entryId(1), number, toy(2));
    await mount(room, sessionId, null, 2, toy());
    await calibrate(room, sessionId, "after", 94.6);
    const { findings } = await endSession(asked(room.operator), { sessionId, at: later(200) });
    expect(findings.map((each) => each.code)).toEqual(["calibrator"]);
    const toReview = { entryId: entryId(0), from: "on_the_bench", to: "in_review", at: later(210) } as const;
    await expect(moveAtBench(asked(room.operator), toReview)).rejects.toMatchObject({
      detail: expect.stringMatching(/is held: The calibrator moved by 0.6 dB/),
    });
    const { holds } = await readSession(room.operator, { sessionId });
    const lift = {
      sessionId,
      holdId: holds[0]?.id ?? "",
      liftNote: "Coupler was loose; checked again",
      at: later(220),
    };
    await expect(liftHold(asked(room.operator), lift)).rejects.toMatchObject({ code: "forbidden" });
    await liftHold(asked(room.second), lift);
    await expect(liftHold(asked(room.second), lift)).rejects.toMatchObject({ code: "moved_on" });
  });

  it("goes to review entry by entry, then as a round", async () => {
    const to = { from: "on_the_bench", to: "in_review", at: later(230) } as const;
    await moveAtBench(asked(room.operator), { entryId: entryId(0), ...to });
    await expect(moveAtBench(asked(room.second), { entryId: entryId(0), ...to })).rejects.toMatchObject({
      code: "moved_on",
      detail: "The entry is in review by now, not on the bench.",
    });
    await expect(roundToReview(asked(room.operator), { roundId: room.roundId, at: later(240) })).rejects.toMatchObject({
      detail: "1 of 2 entries are not in review yet.",
    });
    await moveAtBench(asked(room.operator), { entryId: entryId(1), ...to });
    expect((await readQueue(room.operator)).rounds[0]?.ready).toBe(true);
    expect(await roundToReview(asked(room.operator), { roundId: room.roundId, at: later(250) })).toEqual({
      state: "in_review",
    });
    expect(await db.owner("round").where({ id: room.roundId }).first("state")).toEqual({ state: "in_review" });
    expect((await readSessions(room.operator, { open: true })).items).toEqual([]);
    expect((await readSessions(room.operator, { roundId: room.roundId })).items).toMatchObject([{ id: sessionId }]);
  });
});
