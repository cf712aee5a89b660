import { describe, expect, it } from "vitest";
import { controlPoint, limitsOf, sigmaFloor, type EarlierPoint } from "@/lib/domain/baselines/control-point";
import { studentTQuantile } from "@/lib/science/statistics/distributions";
import { num, nums, vector } from "../support/vectors";

const inside = (values: readonly number[]): EarlierPoint[] => values.map((value) => ({ value, out: false }));
const floor = sigmaFloor("level_dba", 150);

describe("a session's value on its chart", () => {
  it("is held by nothing while fewer than two sessions stand before it", () => {
    expect(controlPoint([], 40, { series: 1, floor })).toMatchObject({ kind: "none", out: [], movingRange: null });
    expect(controlPoint(inside([40]), 43, { series: 1, floor })).toMatchObject({
      kind: "none",
      out: [],
      movingRange: 3,
    });
  });

  it(`is held against the prediction interval while limits are trial: ${vector("T3-22").title}`, () => {
    const v = vector("T3-22");
    const x = nums(v.inputs.x);
    const half = num(v.expected.half_width);
    const at = (value: number) => controlPoint(inside(x), value, { series: 1, floor });
    expect(at(40).upper).toBeCloseTo(num(v.expected.mean) + half, 8);
    expect(at(40).lower).toBeCloseTo(num(v.expected.mean) - half, 8);
    expect(at(40 + half - 1e-6)).toMatchObject({ kind: "trial", out: [] });
    expect(at(40 + half + 1e-6).out).toEqual(["outside the trial limits"]);
    expect(at(40 - half - 1e-6).out).toEqual(["outside the trial limits"]);
  });

  it("shares the 5 % among the charts of a session (Bonferroni: t at 1 − 0.05/(2m))", () => {
    const x = nums(vector("T3-22").inputs.x);
    const one = controlPoint(inside(x), 40, { series: 1, floor });
    const nine = controlPoint(inside(x), 40, { series: 9, floor });
    const width = (point: typeof one) => (point.upper ?? NaN) - (point.lower ?? NaN);
    // By hand from the ratio of quantiles at 4 degrees of freedom.
    expect(width(nine) / width(one)).toBeCloseTo(studentTQuantile(1 - 0.05 / 18, 4) / studentTQuantile(0.975, 4), 9);
  });

  it("leaves a session that was out to the drawing: it widens no trial limit", () => {
    const x = nums(vector("T3-22").inputs.x);
    const clean = controlPoint(inside(x), 40, { series: 1, floor });
    const spoilt = controlPoint([...inside(x), { value: 47, out: true }], 40, { series: 1, floor });
    expect([spoilt.lower, spoilt.upper]).toEqual([clean.lower, clean.upper]);
    expect(spoilt.movingRange).toBeCloseTo(7, 12);
  });

  it("freezes limits at twenty sessions from the mean moving range (NIST/SEMATECH e-Handbook 6.3.2.2)", () => {
    const x = nums(vector("T4-04").inputs.x);
    expect(limitsOf(inside(x.slice(0, 19)), floor)).toBeUndefined();
    const limits = limitsOf(inside(x), floor);
    const ranges = x.slice(1).map((value, i) => Math.abs(value - (x[i] ?? NaN)));
    const meanRange = ranges.reduce((sum, each) => sum + each, 0) / ranges.length;
    expect(limits?.centre).toBeCloseTo(x.reduce((sum, each) => sum + each, 0) / 20, 9);
    // σ = MR̄/d2, d2 = 2/√π.
    expect(limits?.sigma).toBeCloseTo((meanRange * Math.sqrt(Math.PI)) / 2, 9);
    expect(limitsOf(inside([...x, 90, 91]), floor)).toEqual(limits);
  });

  it("is held by three sigma, by runs and by the weighted mean once limits are frozen", () => {
    const frozen = { centre: 40, sigma: 0.2 };
    const at = (before: readonly number[], value: number) =>
      controlPoint(inside(before), value, { frozen, series: 9, floor });
    expect(at([], 40.59)).toMatchObject({ kind: "frozen", out: [] });
    expect(at([], 40.61).out).toContain("one beyond 3 sigma");
    expect(at([40, 40.45], 40.45).out).toContain("two of three beyond 2 sigma on one side");
    expect(at(Array<number>(8).fill(40.07), 40.07).out).toEqual(["nine on one side"]);
    // Within half a display's step of 0.1 of the centre: on it, so that no run is seen in what the display rounds.
    expect(at(Array<number>(8).fill(40.04), 40.04).out).toEqual([]);
    // EWMA, λ = 0.2: 1.4 σ ever since rises to (1 − 0.8^n)·1.4 σ, past 2.962·σ/3 = 0.987 σ from n = 6 on.
    const risen = at([39.9, ...Array<number>(7).fill(40.28)], 40.28);
    expect(risen.out).toContain("weighted mean outside its limits");
    expect(risen.rangeUpper).toBeCloseTo(3.26653191929 * 1.1283791671 * 0.2, 8);
  });

  it("doesn't believe a spread below a display's step (a/√12: JCGM 100:2008, F.2.2.1)", () => {
    const same = inside(Array<number>(20).fill(94));
    expect(limitsOf(same, sigmaFloor("calibrator_db", 150))?.sigma).toBeCloseTo(0.0288675134595, 12);
    expect(sigmaFloor("thermal_resistance_kpw", 150)).toBeCloseTo(0.1 / 150 / Math.sqrt(12), 15);
    expect(controlPoint(same, 94.05, { series: 1, floor }).out).toEqual([]);
  });
});
