import { describe, expect, it } from "vitest";
import {
  compareFigures,
  curveWithIntervals,
  type ComparedEntry,
  type ComparedPair,
} from "@/lib/domain/results/compare-figures";
import { layOver } from "@/lib/domain/results/lay-over";
import { measuredCurve } from "../../factories/measured-point";

/*
 * Expected figures: a script apart from this code, with scipy 1.17.1 (PchipInterpolator, brentq for equal ΔT, t.ppf).
 * Each source of error was moved by ±1e-5 of its unit and the whole comparison read again; half-widths are
 * t(0.975, ν) times the root of the squares, ν by Welch–Satterthwaite and truncated (JCGM 100:2008, 5.1.2, G.4.1). The curves are
 * those of the acoustics handbook's PC-compare with two invented ones beside them.
 */
const spread = {
  uLevelOwnDb: 0.3,
  uDeltaTOwnK: 0.25,
  uLevelOffsetDb: 0.2,
  uDeltaTOffsetK: 0.1,
  uDeltaTGainRel: 0.004,
  dof: 6,
};
const a = measuredCurve([26.3, 30.8, 34.0, 37.5, 41.0, 44.2], [40.1, 33.9, 30.6, 27.2, 25.3, 24.1], spread);
const b = measuredCurve([27.4, 31.9, 35.0, 38.6, 42.9], [38.9, 33.1, 29.9, 27.0, 24.6], spread);
const z = measuredCurve([28.1, 31.4, 35.2, 38.9, 42.6], [38.2, 33.0, 28.7, 26.1, 24.4], spread);
const y = measuredCurve([28.3, 31.7, 35.1, 39.2, 42.5], [38.6, 32.8, 28.9, 26.0, 24.5], spread);

const grade = "engineering" as const;
const sessions = [
  { id: "one", grade, baselinePoints: z },
  { id: "two", grade, baselinePoints: y },
];

const bridge = { fromUnit: "unit 2", ratio: 1.012, u: 0.006, dof: 9 };

function compared(sessionOfB: "one" | "two", levelDba = 36, overBridge = false) {
  const laid = layOver({
    entries: [
      { id: "a", sessionId: "one", points: a },
      { id: "b", sessionId: sessionOfB, points: b },
    ],
    sessions,
  });
  const { entries, pairs } = compareFigures(
    laid,
    () => levelDba,
    (id) => (overBridge && id === "b" ? bridge : undefined),
  );
  return { a: entries[0] as ComparedEntry, b: entries[1] as ComparedEntry, pair: pairs[0] as ComparedPair };
}

/** Value and half-width as scipy has them; the steps of both differences leave the sixth decimal open. */
function expectFigure(figure: { value: number; half95: number } | undefined, value: number, half95: number): void {
  expect(figure?.value).toBeCloseTo(value, 5);
  expect(figure?.half95).toBeCloseTo(half95, 4);
}

describe("figures of a comparison against scipy", () => {
  it("are those of each entry over the baseline of its session", () => {
    const { a: ofA, b: ofB } = compared("one");
    expectFigure(ofA.ratioPercent, 101.690816, 3.267033);
    expectFigure(ofA.deltaTK, 28.511659, 0.823352);
    expectFigure(ofA.differenceK, 0.474064, 0.909321);
    expectFigure(ofA.coolingDb, 0.486683, 1.000438);
    expectFigure(ofB.ratioPercent, 103.477323, 3.266239);
    expectFigure(ofB.differenceK, 0.974958, 0.900866);
    expectFigure(ofB.coolingDb, 1.176694, 1.080747);
  });

  it("cancel the baseline's own error between two entries of one session", () => {
    const { pair } = compared("one");
    expectFigure(pair.percent, -1.786507, 3.288578);
    expectFigure(pair.deltaTK, -0.500894, 0.921594);
    expectFigure(pair.coolingDb, -0.690011, 1.048805);
  });

  it("keep both baselines' errors between entries of two sessions", () => {
    const { b: ofB, pair } = compared("two");
    expectFigure(ofB.ratioPercent, 103.087934, 3.28624);
    expectFigure(ofB.differenceK, 0.869053, 0.911112);
    expectFigure(ofB.coolingDb, 1.043258, 1.074618);
    expectFigure(pair.percent, -1.397118, 4.539963);
    expectFigure(pair.deltaTK, -0.500894, 1.128373);
    expectFigure(pair.coolingDb, -0.556575, 1.437093);
  });
});

describe("an entry against another baseline unit", () => {
  it("is carried over by the bridge, whose uncertainty is added", () => {
    const { b: ofB, pair } = compared("two", 36, true);
    expectFigure(pair.percent, -2.634173, 4.723338);
    expectFigure(ofB.ratioPercent, 103.087934, 3.28624);
  });
});

describe("a tie", () => {
  it("is what the interval leaves open, and only that", () => {
    const { a: ofA, b: ofB, pair } = compared("one");
    // |0.474| < 0.909, but |0.975| > 0.900 K; between the two |−0.501| < 0.921.
    expect([ofA.differenceK?.tie, ofB.differenceK?.tie, pair.deltaTK?.tie]).toEqual([true, false, true]);
  });
});

describe("the probability of no difference", () => {
  it.each([
    ["an entry over its baseline", () => compared("one").a.differenceK],
    ["two entries of one session", () => compared("one").pair.deltaTK],
    ["levels at equal ΔT", () => compared("two").pair.coolingDb],
  ])("of %s agrees with its interval: 0.05 is where the interval ends at 0", (_name, read) => {
    const figure = read();
    expect(figure).toBeDefined();
    if (!figure) return;
    expect(figure.p < 0.05).toBe(Math.abs(figure.value) > figure.half95);
    expect(figure.p).toBeGreaterThan(0);
    expect(figure.p).toBeLessThanOrEqual(1);
  });

  it("is that of Student's distribution", () => {
    const { b: ofB, pair } = compared("one");
    // scipy 1.17.1: 2·t.sf(|value|/(half95/t.ppf(0.975, ν)), ν), value and half95 from the script above, ν = 35, 28 and 34.
    expect(pair.deltaTK?.p).toBeCloseTo(0.277391, 4);
    expect(ofB.differenceK?.p).toBeCloseTo(0.034925, 4);
    expect(pair.coolingDb?.p).toBeCloseTo(0.190094, 4);
  });
});

describe("outside the range of both curves", () => {
  it("nothing is read, and which curve ends is said", () => {
    const below = compared("one", 27);
    expect(below.a).toMatchObject({ why: "baseline-not-reached" });
    expect(below.a.deltaTK).toBeUndefined();
    expect(below.pair.deltaTK).toBeUndefined();
  });
});

describe("a curve with its band", () => {
  // A straight line of ΔT = 100 K − 1.5 K/dB · L, whose band has a closed form; t(0.975, 6) = 2.447 (JCGM 100:2008, table G.2: 2.45).
  const levels = [30, 34, 40, 46];
  const line = (spread: Parameters<typeof measuredCurve>[2]) =>
    curveWithIntervals(
      layOver({
        entries: [
          {
            id: "a",
            sessionId: "one",
            points: measuredCurve(
              levels,
              levels.map((l) => 100 - 1.5 * l),
              spread,
            ),
          },
        ],
        sessions: [{ id: "one", grade, baselinePoints: z }],
      })[0] ?? { curve: undefined },
      8,
    );
  const none = { uLevelOwnDb: 0, uDeltaTOwnK: 0, uLevelOffsetDb: 0, uDeltaTOffsetK: 0, uDeltaTGainRel: 0, dof: 6 };

  it("goes from the lowest level to the highest in even steps, on the line", () => {
    const band = line(none);
    expect(band.map(({ levelDba }) => levelDba)).toEqual([30, 32, 34, 36, 38, 40, 42, 44, 46]);
    for (const { levelDba, deltaTK } of band) {
      expect(deltaTK.value).toBeCloseTo(100 - 1.5 * levelDba, 9);
      expect(deltaTK.half95).toBe(0);
    }
  });

  it("carries an offset of ΔT as it is, and one of the level times the slope (JCGM 100:2008, 5.1.2)", () => {
    for (const { deltaTK } of line({ ...none, uDeltaTOffsetK: 0.1 })) expect(deltaTK.half95 / 0.1).toBeCloseTo(1.96, 2);
    for (const { deltaTK } of line({ ...none, uLevelOffsetDb: 0.2 }))
      expect(deltaTK.half95 / (0.2 * 1.5)).toBeCloseTo(1.96, 2);
  });

  it("is widest at a measured level for what each run has of its own, with that run's degrees of freedom", () => {
    const band = line({ ...none, uDeltaTOwnK: 0.25 });
    for (const levelDba of [30, 34, 40, 46])
      expect((band.find((each) => each.levelDba === levelDba)?.deltaTK.half95 ?? 0) / 0.25).toBeCloseTo(2.447, 3);
    expect(band.find((each) => each.levelDba === 32)?.deltaTK.half95).toBeLessThan(2.447 * 0.25);
  });
});
