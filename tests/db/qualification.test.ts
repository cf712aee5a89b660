import { beforeAll, describe, expect, it } from "vitest";
import { benchSession } from "@/lib/contracts/bench-session";
import { bridges } from "@/db/queries/bridges";
import { startBenchSession } from "@/lib/server/baselines/start-bench-session";
import { unqualifiedBenches } from "@/lib/server/baselines/settle-session";
import { readSession } from "@/lib/server/bench/read-session";
import { liftHold } from "@/lib/server/bench/session-readings";
import { benchRoom, speedsRpm, type BenchRoom } from "../factories/bench-room";
import { allTicked, asked, later } from "../factories/bench-steps";
import { qualifyBench, type Qualifying } from "../factories/qualify-bench";
import { setUpDatabase } from "../setup/database";

const db = setUpDatabase();
let room: BenchRoom;
let of: Omit<Qualifying, "reads" | "at">;

beforeAll(async () => {
  room = await benchRoom(db.owner);
  const season = await db.owner("season").where({ id: room.seasonId }).first("protocol_version_id");
  of = {
    by: room.host,
    benchVersionId: room.benchVersionId,
    budgetVersionId: room.bench.versions[0]?.budgetId ?? "",
    protocolVersionId: season?.protocol_version_id,
    baselineUnitId: room.baselineUnitId,
    positionId: room.positionId,
    setSpeeds: speedsRpm,
  };
});

/** Ten mounts whose ΔT scatters by ±0.3 K in turn: mean 40 K, s = 0.3·√(10/9) = 0.31623 K. */
const reads: Qualifying["reads"] = ({ mount, setSpeed }) => ({
  levelDba: setSpeed === 1100 ? 42 : 48,
  deltaTK: 40 + (mount % 2 === 0 ? 0.3 : -0.3),
});

describe("a bench is qualified by ten remounts of the baseline", () => {
  it("which only the host begins, with every caution ticked", async () => {
    const start = { ...of, purpose: "qualification" as const, checklist: allTicked, at: later(0) };
    await expect(startBenchSession(asked(room.operator), start)).rejects.toMatchObject({ code: "forbidden" });
    const loose = startBenchSession(asked(room.host), { ...start, checklist: {} });
    await expect(loose).rejects.toMatchObject({ code: "malformed" });
  });

  it("not by nine: nothing is agreed, and the season is told what is missing", async () => {
    const { sessionId, findings } = await qualifyBench({ ...of, reads, mounts: 9, at: later(10) });
    expect(findings).toEqual([]);
    const session = benchSession.parse(await readSession(room.host, { sessionId }));
    expect(session.qualification).toMatchObject({
      lacks: ["1 more mounts at 1100", "1 more mounts at 1450"],
      settled: false,
    });
    expect(await db.owner("baseline_value").count()).toEqual([{ count: 0 }]);
    expect(await unqualifiedBenches(db.app, { seasonId: room.seasonId })).toEqual([
      expect.stringMatching(/Alder Bench, version 1 is not qualified at 1100, 1450 rpm: it lacks 10 baseline remounts/),
    ]);
  });

  it("whose repeatability and agreed values, with the session they come from, are written down", async () => {
    const { sessionId } = await qualifyBench({ ...of, reads, at: later(1000) });
    const { qualification } = benchSession.parse(await readSession(room.host, { sessionId }));
    expect(qualification).toMatchObject({ lacks: [], settled: true });
    const point = qualification?.points[0];
    expect(point).toMatchObject({ setSpeed: 1100, mounts: 10, runs: 10 });
    // By hand: s of ±0.3 K over ten is 0.3·√(10/9) K, at 150 W.
    expect(point?.resistanceKpw.value).toBeCloseTo(40 / 150, 9);
    expect(point?.resistanceKpw.sBetween).toBeCloseTo((0.3 * Math.sqrt(10 / 9)) / 150, 9);
    expect(point?.resistanceKpw.sWithin).toBeNull();
    // GUM by hand: own 0.06 K and mount √(0.31623² − 0.06²) = 0.31048 K over √10; offset 0.15 K; gain 0.4 % of 40 K.
    const u = Math.sqrt((0.06 ** 2 + (0.1 - 0.06 ** 2)) / 10 + 0.15 ** 2 + (0.004 * 40) ** 2) / 150;
    expect(point?.resistanceKpw.u).toBeCloseTo(u, 9);
    const agreed = await db.owner("baseline_value").orderBy(["quantity", "set_speed"]);
    expect(agreed.map((row) => [row.quantity, row.set_speed])).toEqual([
      ["level_dba", 1100],
      ["level_dba", 1450],
      ["thermal_resistance_kpw", 1100],
      ["thermal_resistance_kpw", 1450],
    ]);
    expect(agreed.every((row) => row.session_ids.includes(sessionId))).toBe(true);
    expect(await unqualifiedBenches(db.app, { seasonId: room.seasonId })).toEqual([]);
  });

  it("not while a hold stands; once another person lifts it the values are written", async () => {
    const wild: Qualifying["reads"] = (at) => ({
      ...reads(at),
      levelDba: reads(at).levelDba + (at.mount === 10 ? 3 : 0),
    });
    const before = await db.owner("baseline_value").count();
    const { sessionId, findings } = await qualifyBench({ ...of, reads: wild, at: later(2000) });
    expect(findings.map((finding) => finding.code)).toContain("baseline");
    expect(await db.owner("baseline_value").count()).toEqual(before);
    for (const { id } of (await readSession(room.host, { sessionId })).holds) {
      await liftHold(asked(room.second), { sessionId, holdId: id, liftNote: "Clip was loose.", at: later(2600) });
    }
    expect(await db.owner("baseline_value").count()).toEqual([{ count: 8 }]);
  });
});

describe("a bridging session", () => {
  it("runs both units and writes how one stands to the other, which scores then go over, either way", async () => {
    const other = room.bench.baselineUnitIds[0] ?? "";
    await db.owner("baseline_unit").where({ id: other }).update({ retired_at: null, retired_reason: null });
    const { sessionId, findings } = await qualifyBench({
      ...of,
      bridgeUnitId: other,
      mounts: 3,
      at: later(3000),
      // The other unit cools as if its resistance were 0.96 of the session's own, at the same level.
      reads: ({ setSpeed, unitId }) => ({
        levelDba: setSpeed === 1100 ? 42 : 48,
        deltaTK: 40 * (unitId === other ? 0.96 : 1),
      }),
    });
    expect(findings).toEqual([]);
    const rows = await db.owner("bridge").orderBy(["quantity", "set_speed", "level_dba"]);
    expect(rows.map(({ quantity, set_speed, level_dba }) => [quantity, set_speed, level_dba])).toEqual([
      ["level_dba", 1100, null],
      ["level_dba", 1450, null],
      ["thermal_resistance_kpw", 1100, null],
      ["thermal_resistance_kpw", 1450, null],
      ["thermal_resistance_kpw", null, 46],
    ]);
    expect(rows[0]?.difference).toBeCloseTo(0, 9);
    for (const row of rows.slice(2)) expect(row.ratio).toBeCloseTo(1 / 0.96, 9);
    // GUM by hand at 1100 rpm (3.3 of the handbook): own parts of both over three mounts, offset on 1/y_d − 1/y_b only.
    const [yd, yb] = [40, 38.4];
    const own = (0.06 ** 2 + 0.22 ** 2) / 3;
    const rel = Math.sqrt(own / yd ** 2 + own / yb ** 2 + 0.15 ** 2 * (1 / yd - 1 / yb) ** 2);
    expect(rows[2]?.u).toBeCloseTo(rel / 0.96, 9);
    const session = benchSession.parse(await readSession(room.host, { sessionId }));
    expect(session.subjects.map(({ baselineUnitId }) => baselineUnitId)).toEqual([room.baselineUnitId, other]);
    const made = new Date(rows[0]?.created_at);
    // A standing drawn before it doesn't know it.
    expect(await bridges(db.app, { levelDba: 46, asOf: new Date(made.getTime() - 1) })).toEqual([]);
    const pairs = await bridges(db.app, { levelDba: 46, asOf: made });
    const there = pairs.find((pair) => pair.fromUnit === room.baselineUnitId);
    const back = pairs.find((pair) => pair.fromUnit === other);
    expect(there?.toUnit).toBe(other);
    // The other way round: 1/r, u/r².
    expect(back?.ratio).toBeCloseTo(0.96, 9);
    expect((back?.u ?? NaN) / (back?.ratio ?? NaN)).toBeCloseTo((there?.u ?? NaN) / (there?.ratio ?? NaN), 9);
  });
});
