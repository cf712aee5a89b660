import { describe, expect, it } from "vitest";
import { effectiveDof, standardUncertainty } from "@/lib/domain/results/effects";
import { baselineSubject, entrySubject, type MeasuredPoint } from "@/lib/domain/results/measured-point";
import { coolingCurve, risesWithLevel } from "@/lib/domain/results/methods/v1/cooling-curve";
import { equalCooling, equalNoise, reached } from "@/lib/domain/results/methods/v1/equal-noise";
import { setSpeedPoints } from "@/lib/domain/results/methods/v1/set-speed-points";
import { measuredCurve } from "../../factories/measured-point";

// Curves of the acoustics handbook's PC-compare: scipy.interpolate.PchipInterpolator, scipy 1.10.
const BASE = { levels: [28.1, 31.4, 35.2, 38.9, 42.6], deltaTs: [38.2, 33.0, 28.7, 26.1, 24.4] };
const CANDIDATE = { levels: [26.3, 30.8, 34.0, 37.5, 41.0, 44.2], deltaTs: [40.1, 33.9, 30.6, 27.2, 25.3, 24.1] };

const entryOf = (points: readonly MeasuredPoint[]) =>
  coolingCurve(setSpeedPoints(entrySubject("s1", "heronwing"), points, "engineering"));
const baselineOf = (points: readonly MeasuredPoint[]) =>
  coolingCurve(setSpeedPoints(baselineSubject("s1"), points, "engineering"));

function read(entry: readonly MeasuredPoint[], baseline: readonly MeasuredPoint[], levelDba: number) {
  const reading = equalNoise(entryOf(entry), baselineOf(baseline), levelDba);
  if (!reached(reading)) throw new Error(reading.why);
  return reading;
}

describe("equal noise", () => {
  const entry = measuredCurve(CANDIDATE.levels, CANDIDATE.deltaTs);
  const baseline = measuredCurve(BASE.levels, BASE.deltaTs);

  it("reads the differences that scipy's PCHIP gives at 30, 35 and 40 dB(A) (PC-compare)", () => {
    const differences = [30, 35, 40].map((level) => read(entry, baseline, level).differenceK);
    [-0.15161485, 0.68067007, 0.24582336].forEach((expected, i) => expect(differences[i]).toBeCloseTo(expected, 7));
  });

  it("reads inside the range of both with the ends counted in, and never outside", () => {
    expect(reached(equalNoise(entryOf(entry), baselineOf(baseline), 28.1))).toBe(true);
    expect(reached(equalNoise(entryOf(entry), baselineOf(baseline), 42.6))).toBe(true);
    expect(equalNoise(entryOf(entry), baselineOf(baseline), 28)).toEqual({ levelDba: 28, why: "baseline-not-reached" });
    const quiet = entryOf(measuredCurve(CANDIDATE.levels.slice(0, 3), CANDIDATE.deltaTs.slice(0, 3)));
    expect(equalNoise(quiet, baselineOf(baseline), 40)).toEqual({ levelDba: 40, why: "entry-not-reached" });
    expect(equalNoise(entryOf(entry.slice(0, 1)), baselineOf(baseline), 26.3)).toHaveProperty("why");
  });

  it("refuses a level where the baseline rests on a bound, and keeps one where it doesn't", () => {
    // 28.1 read over 25 dB of background is under the engineering limit of 6 dB; 31.4 is over it.
    const bounded = baseline.map((point, i) =>
      i === 0 ? { ...point, levelReadDba: 29.36, backgroundDba: 25 } : point,
    );
    const at = (level: number) => equalNoise(entryOf(entry), baselineOf(bounded), level);
    expect(at(30)).toEqual({ levelDba: 30, why: "baseline-rests-on-bound" });
    expect(reached(at(31.4))).toBe(true);
    expect(reached(at(33))).toBe(true);
  });

  it("has u² = u_T² + slope²·u_L² at a knot, once for each curve (handbook of acoustics 12.5)", () => {
    const own = { uLevelOwnDb: 0.2, uDeltaTOwnK: 0.15, dof: 10 };
    const levels = [30, 35, 40];
    const reading = read(measuredCurve(levels, [36, 30, 27], own), measuredCurve(levels, [40, 34, 30], own), 35);
    // Interior PCHIP slopes by hand, equal steps: harmonic mean of the chords (−1.2, −0.6) and (−1.2, −0.8).
    const slopeEntry = 2 / (1 / -1.2 + 1 / -0.6);
    const slopeBaseline = 2 / (1 / -1.2 + 1 / -0.8);
    const relative = (deltaT: number, slope: number) => (0.15 ** 2 + (slope * 0.2) ** 2) / deltaT ** 2;
    const ratio = 30 / 34;
    const u = ratio * Math.sqrt(relative(30, slopeEntry) + relative(34, slopeBaseline));
    expect(reading.ratio).toBeCloseTo(ratio, 12);
    expect(standardUncertainty(reading.ratioEffects)).toBeCloseTo(u, 8);
    // Welch–Satterthwaite over the four own parts, each with 10 degrees of freedom.
    const parts = [0.15 / 30, (slopeEntry * 0.2) / 30, 0.15 / 34, (slopeBaseline * 0.2) / 34];
    const fourth = parts.reduce((sum, part) => sum + part ** 4 / 10, 0);
    expect(effectiveDof(reading.ratioEffects)).toBeCloseTo((u / ratio) ** 4 / fourth, 4);
    expect(reading.deltaTK).toBeCloseTo(30, 10);
  });

  it("leaves no gain in the ratio, and of an offset what 1/ΔT differs (handbook of metrology 3.3)", () => {
    const levels = [30, 35, 40];
    const gain = { uDeltaTGainRel: 0.02 };
    const gained = read(measuredCurve(levels, [36, 30, 27], gain), measuredCurve(levels, [40, 34, 30], gain), 37);
    expect(standardUncertainty(gained.ratioEffects)).toBeLessThan(1e-9);
    const offset = { uDeltaTOffsetK: 0.3 };
    const shifted = read(measuredCurve(levels, [36, 30, 27], offset), measuredCurve(levels, [40, 34, 30], offset), 35);
    expect(standardUncertainty(shifted.ratioEffects)).toBeCloseTo((30 / 34) * 0.3 * (1 / 30 - 1 / 34), 8);
  });

  it("moves all of a subject's points by one draw where one mount was at every set speed", () => {
    // ΔT of every point up by the same d shifts a PCHIP by d: at any level the ratio moves by d ÷ ΔT_baseline.
    const levels = [30, 35, 40];
    const mount = measuredCurve(levels, [36, 30, 27], { uDeltaTMountK: 0.2 });
    const base = measuredCurve(levels, [40, 34, 30]);
    const reading = read(mount, base, 37);
    expect(standardUncertainty(reading.ratioEffects)).toBeCloseTo((0.2 * reading.ratio) / reading.deltaTK, 8);
  });

  it("merges points closer than 0.1 dB to the mean of both, and not those 0.1 dB apart (handbook of acoustics 12.2)", () => {
    const curve = entryOf(measuredCurve([30, 30.06, 35, 35.1], [36, 34, 30, 29]));
    expect(curve?.resistanceKnots.map(({ x }) => x)).toEqual([30.03, 35, 35.1]);
    expect(curve?.resistance.value(30.03)).toBeCloseTo(0.35, 12);
  });

  it("keeps and flags a curve that rises with level", () => {
    const curve = entryOf(measuredCurve([30, 35, 40], [36, 37, 30]));
    expect(curve && risesWithLevel(curve)).toBe(true);
    expect(curve?.resistanceKnots).toHaveLength(3);
  });
});

describe("level at equal cooling", () => {
  it("inverts the same interpolant: the levels of PC-inverse-cand (scipy PCHIP, root-finding)", () => {
    // A baseline whose ΔT at 30, 35 and 40 dB(A) is the target.
    const entry = entryOf(measuredCurve(CANDIDATE.levels, CANDIDATE.deltaTs));
    const targets = [30, 27, 25];
    const baseline = baselineOf(measuredCurve([30, 35, 40], targets));
    const found = [30, 35, 40].map((level) => equalCooling(entry, baseline, level)?.entryLevelDba);
    [34.58250026, 37.79434227, 41.69789953].forEach((expected, i) => expect(found[i]).toBeCloseTo(expected, 6));
  });

  it("divides by the slope: own ΔT errors of 0.15 K at a knot, slopes by hand", () => {
    const own = { uDeltaTOwnK: 0.15 };
    const entry = entryOf(measuredCurve([30, 35, 40], [36, 30, 27], own));
    const baseline = baselineOf(measuredCurve([31, 36, 41], [36, 30, 27], own));
    const reading = equalCooling(entry, baseline, 36);
    const slope = 2 / (1 / -1.2 + 1 / -0.6);
    expect(reading?.differenceDb).toBeCloseTo(-1, 9);
    expect(standardUncertainty(reading?.effects ?? [])).toBeCloseTo((Math.SQRT2 * 0.15) / Math.abs(slope), 6);
  });
});
