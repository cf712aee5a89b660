import { describe, expect, it } from "vitest";
import { nextRun } from "@/lib/domain/bench/next-run";
import { runLacks } from "@/lib/domain/bench/run-lacks";

const runs = (...mounts: number[]) => mounts.map((mount) => ({ setSpeed: 1100, mount, runs: 1 }));

describe("the next run", () => {
  it("is the baseline's first, then the entries' in order, then the baseline's last", () => {
    const subjects = (baseline: number[], one: number[], two: number[]) => [
      { entryId: null, baselineUnitId: "unit", missing: runs(...baseline) },
      { entryId: "one", baselineUnitId: null, missing: runs(...one) },
      { entryId: "two", baselineUnitId: null, missing: runs(...two) },
    ];
    expect(nextRun(subjects([1, 2], [1, 2], [1]))).toEqual({
      entryId: null,
      baselineUnitId: "unit",
      setSpeed: 1100,
      mount: 1,
    });
    expect(nextRun(subjects([2], [2], [1]))).toEqual({
      entryId: "one",
      baselineUnitId: null,
      setSpeed: 1100,
      mount: 2,
    });
    expect(nextRun(subjects([2], [], [1]))).toEqual({ entryId: "two", baselineUnitId: null, setSpeed: 1100, mount: 1 });
    expect(nextRun(subjects([2], [], []))).toEqual({ entryId: null, baselineUnitId: "unit", setSpeed: 1100, mount: 2 });
    expect(nextRun(subjects([], [], []))).toBeUndefined();
  });
  it("goes to the other unit of a bridge between the baseline's first and last", () => {
    const units = (own: number[], other: number[]) => [
      { entryId: null, baselineUnitId: "own", missing: runs(...own) },
      { entryId: null, baselineUnitId: "other", missing: runs(...other) },
    ];
    expect(nextRun(units([1, 2], [1]))).toMatchObject({ baselineUnitId: "own", mount: 1 });
    expect(nextRun(units([2], [1]))).toMatchObject({ baselineUnitId: "other", mount: 1 });
    expect(nextRun(units([2], []))).toMatchObject({ baselineUnitId: "own", mount: 2 });
  });
});

describe("what a run lacks", () => {
  const positions = [
    { id: "a", name: "on axis" },
    { id: "b", name: "at 45°" },
  ];
  const of = (...readings: [string, string?][]) =>
    runLacks(
      readings.map(([quantity, positionId]) => ({ quantity, positionId: positionId ?? null })),
      positions,
    );

  it("is named until there is a level at every position, a rise and a power", () => {
    expect(of()).toEqual(["level on axis", "level at 45°", "sensor temperature", "ambient temperature", "power"]);
    expect(of(["level_dba", "a"], ["level_dba", "a"], ["sensor_c"], ["power_w"])).toEqual([
      "level at 45°",
      "ambient temperature",
    ]);
    expect(of(["level_dba", "a"], ["level_dba", "b"], ["delta_t_k"], ["power_w"])).toEqual([]);
  });
});
