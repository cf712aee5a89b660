import { beforeAll, describe, expect, it } from "vitest";
import { moveAtBench } from "@/lib/server/bench/entry-moves";
import { readSession } from "@/lib/server/bench/read-session";
import { addRun, addRunReadings, setRunState } from "@/lib/server/bench/runs";
import { addSessionReading, holdSession, supersedeReading } from "@/lib/server/bench/session-readings";
import { editSession, endSession, startSession } from "@/lib/server/bench/sessions";
import { addSpecimen, recordPart } from "@/lib/server/bench/specimens";
import { benchRoom, type BenchRoom } from "../factories/bench-room";
import { allTicked, asked, later, openSession, passedPart, toTheBench } from "../factories/bench-steps";
import { setUpDatabase } from "../setup/database";

const db = setUpDatabase();
let room: BenchRoom;
let sessionId: string;
const first = () => room.entries[0]?.entryId ?? "";
const secondEntry = () => room.entries[1]?.entryId ?? "";
const by = () => asked(room.operator);
const typed = "typed" as const;

beforeAll(async () => {
  room = await benchRoom(db.owner);
  await toTheBench(room, first());
  sessionId = await openSession(room);
});

describe("a session", () => {
  it("starts with every caution ticked, once a bench, on what the season uses", async () => {
    const { roundId, benchVersionId, baselineUnitId } = room;
    const start = (change: object) =>
      startSession(by(), { roundId, benchVersionId, baselineUnitId, checklist: allTicked, ...change }, later(6));
    await expect(start({ checklist: { ...allTicked, guard: false } })).rejects.toMatchObject({
      code: "malformed",
      fields: [{ path: "checklist.guard" }],
    });
    await expect(start({ baselineUnitId: room.bench.baselineUnitIds[0] })).rejects.toMatchObject({ code: "malformed" });
    await expect(start({})).rejects.toMatchObject({
      code: "moved_on",
      detail: expect.stringMatching(/open on this bench/),
    });
    await expect(
      startSession(asked(room.designer), { roundId, benchVersionId, baselineUnitId, checklist: allTicked }, later(6)),
    ).rejects.toMatchObject({ code: "forbidden" });
  });

  it("keeps the first of two changes made at once", async () => {
    expect(await editSession(by(), { sessionId, version: 1, note: "door closed" })).toEqual({ version: 2 });
    await expect(editSession(asked(room.second), { sessionId, version: 1, note: "door open" })).rejects.toMatchObject({
      code: "moved_on",
    });
    expect((await readSession(room.second, { sessionId })).note).toBe("door closed");
  });

  it("takes a heated background of at most 30 s", async () => {
    const reading = { quantity: "background_dba" as const, positionId: room.positionId, value: 27.5, heated: true };
    await expect(addSessionReading(by(), { sessionId, reading: { ...reading, durationS: 31 } })).rejects.toMatchObject({
      fields: [{ path: "durationS" }],
    });
    await addSessionReading(by(), { sessionId, reading: { ...reading, durationS: 30 } });
    expect((await readSession(room.operator, { sessionId })).backgrounds).toMatchObject([
      { heated: true, durationS: 30 },
    ]);
  });
});

describe("a run", () => {
  const run = () => ({ sessionId, entryId: first(), setSpeed: 1100, mountNumber: 1, repeatNumber: 1 });

  it("refuses figures that can't be, field by field, and keeps nothing of them", async () => {
    const readings = [
      { quantity: "sensor_c" as const, value: 21, source: typed },
      { quantity: "ambient_c" as const, value: 22, source: typed },
      { quantity: "level_dba" as const, value: 400, positionId: room.positionId, source: typed },
    ];
    await expect(addRun(by(), { ...run(), readings })).rejects.toMatchObject({
      code: "impossible",
      fields: [
        { path: "readings[2].value" },
        { path: "readings[0].value", message: expect.stringMatching(/above 0 K/) },
      ],
    });
    await expect(addRun(by(), { ...run(), setSpeed: 999, readings: [] })).rejects.toMatchObject({ code: "malformed" });
    expect((await readSession(room.operator, { sessionId })).runs).toEqual([]);
  });

  it("is one a mount and set speed, changed by one person at a time, and done when it lacks nothing", async () => {
    const { runId } = await addRun(by(), { ...run(), readings: [{ quantity: "ambient_c", value: 22, source: typed }] });
    await expect(addRun(asked(room.second), { ...run(), readings: [] })).rejects.toMatchObject({
      code: "already_there",
    });
    await expect(setRunState(by(), { runId, version: 1, state: "done" })).rejects.toMatchObject({
      detail: "The run isn't done: it lacks level on axis, sensor temperature, power.",
    });
    const power = { quantity: "power_w" as const, value: 150, source: typed };
    expect(await addRunReadings(by(), { runId, version: 1, readings: [power] })).toMatchObject({ version: 2 });
    await expect(addRunReadings(asked(room.second), { runId, version: 1, readings: [power] })).rejects.toMatchObject({
      code: "moved_on",
    });
    await expect(addRunReadings(by(), { runId, version: 2, readings: [power] })).rejects.toMatchObject({
      code: "already_there",
    });
    // Ambient of 22 °C is there: a sensor at 22 °C would make ΔT 0.
    await expect(
      addRunReadings(by(), { runId, version: 2, readings: [{ quantity: "sensor_c", value: 22, source: typed }] }),
    ).rejects.toMatchObject({ code: "impossible" });
    await expect(setRunState(by(), { runId, version: 2, state: "held" })).rejects.toMatchObject({
      fields: [{ path: "reason" }],
    });
  });

  it("keeps a superseded reading beside the new one", async () => {
    const before = await readSession(room.operator, { sessionId });
    const ambient = before.readings.find((each) => each.quantity === "ambient_c");
    const change = { readingId: ambient?.id ?? "", reason: "misread the display" };
    await expect(supersedeReading(by(), { ...change, value: 400 })).rejects.toMatchObject({
      fields: [{ path: "value" }],
    });
    const { readingId } = await supersedeReading(by(), { ...change, value: 22.4 });
    await expect(supersedeReading(asked(room.second), { ...change, value: 23 })).rejects.toMatchObject({
      code: "moved_on",
    });
    const { readings } = await readSession(room.operator, { sessionId });
    expect(readings.filter((each) => each.quantity === "ambient_c")).toMatchObject([
      { value: 22, supersededBy: readingId },
      { value: 22.4, supersededBy: null, supersedes: ambient?.id, reason: "misread the display" },
    ]);
  });

  it("isn't taken for an entry that isn't on the bench, nor by an operator who owns it", async () => {
    await expect(addRun(by(), { ...run(), entryId: secondEntry(), readings: [] })).rejects.toMatchObject({
      code: "moved_on",
      detail: "The entry is accepted, not on the bench.",
    });
    const design = await db.owner("design").where({ name: "Heronwing" }).first("id");
    await db.owner("design_owner").insert({ design_id: design.id, person_id: room.second.personId });
    await expect(addRun(asked(room.second), { ...run(), mountNumber: 2, readings: [] })).rejects.toMatchObject({
      code: "forbidden",
    });
    await expect(readSession(room.second, { sessionId })).rejects.toMatchObject({ code: "forbidden" });
  });

  it("takes nothing after the session's end, but is held by hand", async () => {
    await endSession(by(), { sessionId, at: later(60) });
    await expect(addRun(by(), { ...run(), mountNumber: 2, readings: [] })).rejects.toMatchObject({ code: "moved_on" });
    const { readings } = await readSession(room.operator, { sessionId });
    await expect(
      supersedeReading(by(), { readingId: readings[0]?.id ?? "", value: 27, reason: "typing error" }),
    ).rejects.toMatchObject({ code: "moved_on", detail: expect.stringMatching(/session is closed/) });
    await holdSession(by(), { sessionId, reason: "A door was left open", at: later(61) });
    const { holds } = await readSession(room.operator, { sessionId });
    expect(holds.find((hold) => hold.code === "operator")).toMatchObject({ reason: "A door was left open" });
  });
});

describe("a printed copy", () => {
  it("passes with mass, balance, a spin-up at the highest set speed and every caution ticked", async () => {
    const entryId = secondEntry();
    await expect(
      addSpecimen(by(), { entryId, material: "PETG", colour: "", note: "" }, later(70)),
    ).rejects.toMatchObject({ code: "moved_on" });
    await moveAtBench(by(), { entryId, from: "accepted", to: "printing", at: later(71) });
    const made = await addSpecimen(by(), { entryId, material: "PETG", colour: "", note: "" }, later(72));
    const part = { specimenId: made.specimenId, rotorPosition: 1, at: later(73) };
    const lacking = { ...passedPart, spinUpSpeedRpm: 1449, balanceRecord: "", cautions: { guard: true } };
    await expect(recordPart(by(), { ...part, ...lacking })).rejects.toMatchObject({
      fields: ["balanceRecord", "spinUpSpeedRpm", "cautions.eyes", "cautions.steps", "cautions.vibration"].map(
        (path) => ({
          path,
        }),
      ),
    });
    await recordPart(by(), { ...part, ...passedPart });
    const toBench = { entryId, from: "printing", to: "on_the_bench", at: later(74) } as const;
    // Slow Mill has two rotors, and only one has passed.
    await expect(moveAtBench(by(), toBench)).rejects.toMatchObject({ code: "moved_on" });
    await expect(moveAtBench(by(), { entryId, from: "printing", to: "printing", at: later(75) })).rejects.toMatchObject(
      { fields: [{ path: "reason" }] },
    );
    await moveAtBench(by(), { entryId, from: "printing", to: "printing", reason: "a blade warped", at: later(75) });
    expect(
      await db.owner("specimen_part").where({ specimen_id: made.specimenId }).orderBy("rotor_position").pluck("state"),
    ).toEqual(["passed", "failed"]);
  });

  it("keeps its record once it has run, and is written off with the move back to print", async () => {
    const part = await db.owner("specimen").where({ revision_id: room.entries[0]?.revisionId }).first("id");
    await expect(
      recordPart(by(), { specimenId: part.id, rotorPosition: 1, at: later(80), ...passedPart }),
    ).rejects.toMatchObject({ code: "moved_on" });
    await moveAtBench(by(), {
      ...{ entryId: first(), from: "on_the_bench", to: "printing" },
      ...{ reason: "a blade tip cracked", at: later(81) },
    });
    expect(await db.owner("specimen_part").where({ specimen_id: part.id }).pluck("state")).toEqual(["written_off"]);
  });
});
