import { describe, expect, it } from "vitest";
import { createRandom } from "@/lib/science/statistics/random";
import { steadyMean } from "@/lib/science/thermal/steady-mean";
import { findSteadyWindow, HOUSE_RULE, type SteadyRecord } from "@/lib/science/thermal/steady-window";
import { varianceRatio } from "@/lib/science/thermal/variance-ratio";

/** A record every `stepS` seconds with the rise, ambient and rounding given. */
function made(options: {
  lengthS: number;
  stepS?: number;
  rise?: (t: number) => number;
  noise?: (white: number, last: number) => number;
  ambient?: (t: number) => number;
  display?: number;
}): SteadyRecord {
  const random = createRandom(11);
  const stepS = options.stepS ?? 5;
  const timeS = Float64Array.from({ length: Math.floor(options.lengthS / stepS) + 1 }, (_, i) => i * stepS);
  let last = 0;
  const deltaTK = timeS.map((t) => {
    last = (options.noise ?? ((white) => 0.05 * white))(random.normal(), last);
    const value = (options.rise ?? (() => 38))(t) + last;
    return options.display ? Math.round(value / options.display) * options.display : value;
  });
  return { timeS, deltaTK, ambientC: timeS.map(options.ambient ?? (() => 22)) };
}

const approach = (t: number) => 40 - 30 * Math.exp(-t / 200);

describe("steady window", () => {
  it("is found after an approach, ends at the last sample and holds its mean within the limit", () => {
    const record = made({ lengthS: 3600, rise: approach });
    const found = findSteadyWindow(record);
    expect(found.broken).toEqual([]);
    expect(found.withoutRatio).toBeUndefined();
    expect(found.transient?.fit.tau).toBeCloseTo(200, -1);
    const from = found.from ?? NaN;
    expect(record.timeS[from]).toBeGreaterThan(700);
    const mean = steadyMean(record.timeS.subarray(from), record.deltaTK.subarray(from), found.tauS, found.step);
    expect(Math.abs((mean?.deltaTK ?? NaN) - 40)).toBeLessThan(2 * (mean?.uDeltaTK ?? NaN) + 0.02);
  });
  it("is found on a record that was steady all along, nearly from its start", () => {
    const record = made({ lengthS: 1800 });
    const found = findSteadyWindow(record);
    expect(found.from).toBeLessThan(60);
    expect(found.transient).toBeUndefined();
  });
  it("is refused while the approach goes on, and names the clauses", () => {
    const found = findSteadyWindow(made({ lengthS: 500, rise: approach }));
    expect(found.from).toBeUndefined();
    expect(found.broken).toContain("slope");
  });
  it("is refused on a slow steady drift that the variance ratio can't see", () => {
    const record = made({ lengthS: 3600, rise: (t) => 38 + t * 2e-4 });
    const found = findSteadyWindow(record);
    expect(Math.max(...varianceRatio(record.deltaTK).subarray(60))).toBeLessThan(4);
    expect(found.from === undefined || (record.timeS[found.from] ?? 0) > 3000).toBe(true);
  });
  it("is refused for a record shorter than the shortest window", () => {
    expect(findSteadyWindow(made({ lengthS: 100 })).broken).toEqual(["window"]);
  });
  it("is shortened or refused where the ambient drifts", () => {
    const record = made({ lengthS: 1800, stepS: 0.5, ambient: (t) => 20 + t / 900 });
    const found = findSteadyWindow(record);
    expect(found.from).toBeDefined();
    const spanS = 1800 - (record.timeS[found.from ?? NaN] ?? NaN);
    expect(spanS / 900).toBeLessThanOrEqual(HOUSE_RULE.ambientDriftMaxK + 1e-9);
  });
  it("falls back to slope and fit on a coarse display, whose step then counts", () => {
    const record = made({ lengthS: 3600, rise: approach, display: 0.5 });
    const found = findSteadyWindow(record);
    expect(found.withoutRatio).toBe("quantised");
    expect(found.step).toBeCloseTo(0.5, 9);
    const mean = steadyMean(record.timeS, record.deltaTK, found.tauS, found.step);
    expect(mean?.uResolutionK).toBeCloseTo(0.5 / Math.sqrt(12), 9);
  });
  it("falls back to slope and fit on autocorrelated noise", () => {
    const found = findSteadyWindow(
      made({ lengthS: 7200, rise: approach, noise: (white, last) => 0.8 * last + 0.02 * white }),
    );
    expect(found.withoutRatio).toBe("autocorrelated");
    expect(found.from).toBeDefined();
  });
  it("leaves out a first stretch with the heat off", () => {
    const found = findSteadyWindow(
      made({ lengthS: 3600, rise: (t) => (t < 600 ? 0 : 40 - 40 * Math.exp(-(t - 600) / 200)) }),
    );
    expect(found.transient?.fit.tau).toBeGreaterThan(180);
    expect(found.transient?.fit.tau).toBeLessThan(220);
    expect(found.from).toBeDefined();
  });
  it("knows nothing of an empty record, and calls a display that never moves steady but not exact", () => {
    expect(findSteadyWindow(made({ lengthS: -10 })).from).toBeUndefined();
    expect(findSteadyWindow(made({ lengthS: 1800, ambient: (t) => 20 + t / 200 })).broken).toContain("ambient-drift");
    const still = findSteadyWindow(made({ lengthS: 600, noise: () => 0 }));
    expect(still).toMatchObject({ from: 0, withoutRatio: "quantised" });
  });
});
