import { beforeAll, describe, expect, it } from "vitest";
import { benchSession } from "@/lib/contracts/bench-session";
import { documentChange } from "@/lib/server/baselines/document-change";
import { moveAtBench } from "@/lib/server/bench/entry-moves";
import { readSession } from "@/lib/server/bench/read-session";
import { roundToReview } from "@/lib/server/bench/round-to-review";
import { endSession, startSession } from "@/lib/server/bench/sessions";
import { readRoundForReview } from "@/lib/server/review/read-round";
import { signRound } from "@/lib/server/review/sign-round";
import { benchRoom, type BenchRoom } from "../factories/bench-room";
import { allTicked, asked, calibrate, later, mount, readBackground, toTheBench } from "../factories/bench-steps";
import { setUpDatabase } from "../setup/database";

const db = setUpDatabase();
let room: BenchRoom;
let held: string;
let minute = 5;

beforeAll(async () => {
  room = await benchRoom(db.owner);
  await toTheBench(room, room.entries[0]?.entryId ?? "");
  await toTheBench(room, room.entries[1]?.entryId ?? "");
});

/** The baseline as it stands on this bench, a little different every session; `louder` is what changed, dB. */
const reads =
  (wobble: number, louder = 0) =>
  (speedRpm: number) => ({
    levelDba: (speedRpm === 1100 ? 42 : 48) + wobble + louder,
    sensorC: (speedRpm === 1100 ? 62 : 52) + wobble,
  });

async function begin(): Promise<string> {
  const { roundId, benchVersionId, baselineUnitId, operator } = room;
  const input = { roundId, benchVersionId, baselineUnitId, checklist: allTicked };
  const { sessionId } = await startSession(asked(operator), input, later((minute += 30)));
  await calibrate(room, sessionId, "before");
  await readBackground(room, sessionId);
  return sessionId;
}

async function finish(sessionId: string) {
  await calibrate(room, sessionId, "after");
  return endSession(asked(room.operator), { sessionId, at: later((minute += 30)) });
}

const checks = () => db.owner("baseline_check").orderBy(["at", "quantity", "set_speed"]);

describe("the baseline on its control charts", () => {
  it("is charted at the end of each session: level and ΔT/P at each set speed, and the calibrator", async () => {
    for (const wobble of [0, 0.1, -0.1]) {
      const sessionId = await begin();
      for (const number of [1, 2]) await mount(room, sessionId, null, number, reads(wobble));
      expect((await finish(sessionId)).findings).toEqual([]);
    }
    const rows = await checks();
    expect(rows).toHaveLength(3 * 5);
    expect(new Set(rows.map((row) => `${row.quantity} ${row.set_speed}`)).size).toBe(5);
    const third = rows.filter((row) => row.quantity === "thermal_resistance_kpw" && row.set_speed === 1100)[2];
    // By hand: ΔT 40.0, 40.1, 39.9 K at 150 W; the third lies 0.2 K below the one before it.
    expect(third?.value).toBeCloseTo(39.9 / 150, 9);
    expect(third?.chart).toMatchObject({ kind: "trial", before: 2, out: [] });
    expect(third?.chart.movingRange).toBeCloseTo(0.2 / 150, 9);
    expect(await db.owner("control_phase").where({ trial: true }).count()).toEqual([{ count: 5 }]);
  });

  it("is shown out of control while the session is still open", async () => {
    held = await begin();
    await mount(room, held, null, 1, reads(0, 4));
    const session = benchSession.parse(await readSession(room.operator, { sessionId: held }));
    expect(session.gates.map((gate) => gate.reason).join(" ")).toMatch(/out of control: level at 1100 rpm/);
    expect(session.control.filter((check) => check.out.length > 0).map((check) => check.quantity)).toEqual([
      "level_dba",
      "level_dba",
    ]);
  });

  it("holds the session, whose round can't be signed, with the reason on screen", async () => {
    for (const { entryId } of room.entries) {
      for (const number of [1, 2]) await mount(room, held, entryId, number, reads(-0.3, 4));
    }
    await mount(room, held, null, 2, reads(0, 4));
    const { findings } = await finish(held);
    expect(findings.map(({ code }) => code)).toEqual(["baseline"]);
    const { holds } = await readSession(room.operator, { sessionId: held });
    expect(holds).toMatchObject([{ code: "baseline", control: true, liftedAt: null }]);
    expect(holds[0]?.whatToDo).toMatch(/host documents it/);
    const toReview = { entryId: room.entries[0]?.entryId ?? "", from: "on_the_bench", to: "in_review" } as const;
    await expect(moveAtBench(asked(room.operator), { ...toReview, at: later(400) })).rejects.toMatchObject({
      detail: expect.stringContaining("The baseline is out of control"),
    });
    const round = await readRoundForReview(room.second, { roundId: room.roundId });
    expect(round.whyNotSign.join(" ")).toMatch(/held: The baseline is out of control: level at 1100 rpm/);
    const sign = signRound(asked(room.second), { roundId: room.roundId, remark: "", at: later(410) });
    await expect(sign).rejects.toThrow("The baseline is out of control");
  });

  it("is not let go by its operator, nor by a member or an operator who documents nothing", async () => {
    const change = {
      benchVersionId: room.benchVersionId,
      fromSessionId: held,
      kind: "service",
      allUnits: true,
    } as const;
    const all = { ...change, reason: "New microphone jig", at: later(420) };
    await expect(documentChange(asked(room.second), all)).rejects.toMatchObject({ code: "forbidden" });
    await expect(documentChange(asked(room.designer), all)).rejects.toMatchObject({ code: "forbidden" });
    await db.owner("session").where({ id: held }).update({ operator_id: room.host.personId });
    await expect(documentChange(asked(room.host), all)).rejects.toMatchObject({ code: "forbidden" });
    await db.owner("session").where({ id: held }).update({ operator_id: room.operator.personId });
    expect(await db.owner("control_break").count()).toEqual([{ count: 0 }]);
  });

  it("goes on after a documented change, which begins a new phase with its reason", async () => {
    const answer = await documentChange(asked(room.host), {
      benchVersionId: room.benchVersionId,
      fromSessionId: held,
      kind: "service",
      reason: "New microphone jig, 10 mm nearer",
      allUnits: true,
      at: later(430),
    });
    expect(answer.released).toHaveLength(1);
    const { holds, control } = await readSession(room.operator, { sessionId: held });
    expect(holds[0]?.liftNote).toBe("Documented change: New microphone jig, 10 mm nearer");
    expect(control.every((check) => check.kind === "none" && check.out.length === 0)).toBe(true);
    const phases = await db.owner("control_phase").whereNotNull("break_id").select("reason", "trial");
    expect(phases).toHaveLength(5);
    expect(new Set(phases.map((phase) => phase.reason))).toEqual(new Set(["New microphone jig, 10 mm nearer"]));
    const again = documentChange(asked(room.host), {
      ...{ benchVersionId: room.benchVersionId, fromSessionId: held, kind: "other", reason: "again", allUnits: true },
      at: later(435),
    });
    await expect(again).rejects.toMatchObject({ code: "malformed" });
    for (const { entryId } of room.entries) {
      await moveAtBench(asked(room.operator), { entryId, from: "on_the_bench", to: "in_review", at: later(440) });
    }
    await roundToReview(asked(room.operator), { roundId: room.roundId, at: later(450) });
    await signRound(asked(room.second), { roundId: room.roundId, remark: "", at: later(460) });
    expect(await db.owner("round").where({ id: room.roundId }).first("state")).toEqual({ state: "signed" });
  });
});
