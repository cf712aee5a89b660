import { expect, it } from "vitest";
import { levelsReached, type ReachPoint } from "@/lib/domain/scoring/levels-reached";

const curve = (...points: [levelDba: number, deltaTK: number][]): ReachPoint[] =>
  points.map(([levelDba, deltaTK], i) => ({
    setSpeedRpm: 600 + 300 * i,
    levelDba,
    correctionDb: 0,
    upperBound: false,
    deltaTK,
    powerW: 150,
  }));

// A level is reached inside both curves, ends counted in, and never outside (product rule 5).
it("says of each level who doesn't reach it", () => {
  const entry = curve([38, 60], [44, 52], [50, 47]);
  const baseline = curve([36, 61], [45, 51], [49, 48]);
  expect(levelsReached(entry, baseline, [35, 37, 38, 49, 50])).toEqual([
    "baseline-not-reached",
    "entry-not-reached",
    "reached",
    "reached",
    "baseline-not-reached",
  ]);
});

it("counts a baseline that rests on a bound as not reaching the level", () => {
  const bound = curve([36, 61], [45, 51], [49, 48]).map((point, i) => ({ ...point, upperBound: i === 0 }));
  expect(levelsReached(curve([34, 60], [50, 47]), bound, [38, 47])).toEqual(["baseline-not-reached", "reached"]);
});

it("reaches nothing with a single point", () => {
  expect(levelsReached(curve([40, 55]), curve([36, 61], [49, 48]), [40])).toEqual(["entry-not-reached"]);
});
