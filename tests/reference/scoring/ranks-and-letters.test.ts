import { describe, expect, it } from "vitest";
import { standardUncertainty } from "@/lib/domain/results/effects";
import { roundAnswer } from "@/lib/domain/scoring/round-answer";
import { scoreRound } from "@/lib/domain/scoring/score-round";
import { measuredPoint } from "../../factories/measured-point";
import { roundInput } from "../../factories/round-input";
import { num, nums, record, vector } from "../support/vectors";

/** Entries whose plain sum is the mean, with an own ΔT error of u and nothing shared. */
function independent(means: readonly number[], us: readonly number[]) {
  return Object.fromEntries(
    means.map((mean, i) => [
      "ABCD".charAt(i),
      [measuredPoint({ deltaTK: mean, levelReadDba: 0, uDeltaTOwnK: us[i] ?? Number.NaN })],
    ]),
  );
}

describe("ranks of independent entries", () => {
  const first = vector("T11-13");
  it(`simulates the chances of first place within four standard errors: ${first.title}`, () => {
    const draws = 20_000;
    const { ranked } = scoreRound(roundInput(independent(nums(first.inputs.mean), nums(first.inputs.u)), { draws }));
    const found = [...ranked.values()].map(({ spread }) => spread.pFirst);
    nums(first.expected.P_first).forEach((p, i) => {
      expect(Math.abs((found[i] ?? Number.NaN) - p)).toBeLessThan(4 * Math.sqrt((p * (1 - p)) / draws));
    });
    expect(found.reduce((sum, p) => sum + p, 0)).toBeCloseTo(1, 9);
  });

  const separable = vector("T11-16");
  it(`tests pairs against the normal where degrees of freedom are infinite: ${separable.title}`, () => {
    const input = roundInput(independent(nums(separable.inputs.mean), nums(separable.inputs.u)));
    const { comparisons } = scoreRound(input);
    const expected = record(separable.expected.p);
    for (const { a, b, p } of comparisons) expect(p).toBeCloseTo(num(expected[`${a}-${b}`]), 9);
    // Holm by hand: p × (6, 5, 4, 3, 2, 1) from the smallest, never falling. Below 0.05: A-D and B-D only.
    const holm = comparisons.map(({ a, b, pHolm }) => [`${a}-${b}`, Number(pHolm.toFixed(6))]);
    expect(Object.fromEntries(holm)).toEqual({
      "A-D": 0.003622,
      "B-D": 0.03966,
      "A-C": 0.135579,
      "C-D": 0.177689,
      "B-C": 0.460279,
      "A-B": 0.548506,
    });
    expect(roundAnswer(scoreRound(input)).entries.map(({ letters }) => letters)).toEqual(["a", "a", "ab", "b"]);
  });

  it("uses t where degrees of freedom are few: Welch's test of handbook vector U-diff, p = 0.0119", () => {
    // a: 34.1, 34.6, 34.3, b: 35.2, 35.0, 35.5 dB; s/√3 of each, 2 degrees of freedom each.
    const u = (values: readonly number[]) => {
      const mean = values.reduce((sum, x) => sum + x, 0) / 3;
      return Math.sqrt(values.reduce((sum, x) => sum + (x - mean) ** 2, 0) / 6);
    };
    const point = (values: readonly number[]) => [
      measuredPoint({
        deltaTK: 30,
        levelReadDba: values.reduce((sum, x) => sum + x, 0) / 3,
        uLevelOwnDb: u(values),
        dof: 2,
      }),
    ];
    const { comparisons } = scoreRound(roundInput({ A: point([34.1, 34.6, 34.3]), B: point([35.2, 35, 35.5]) }));
    expect(comparisons[0]?.u).toBeCloseTo(0.2055, 4);
    expect(comparisons[0]?.dof).toBeCloseTo(4, 1);
    expect(comparisons[0]?.p).toBeCloseTo(0.0119, 4);
  });
});

describe("shared parts in a comparison of two entries of a session", () => {
  it("cancel: offsets fully, a gain but for the difference (JCGM 100:2008, F.1.2.3, by hand)", () => {
    const shared = { uDeltaTOffsetK: 0.5, uLevelOffsetDb: 0.7, uDeltaTGainRel: 0.01, uDeltaTOwnK: 0.1 };
    const { comparisons, ranked } = scoreRound(
      roundInput({
        A: [measuredPoint({ deltaTK: 30, ...shared })],
        B: [measuredPoint({ deltaTK: 32, ...shared })],
      }),
    );
    expect(comparisons[0]?.u).toBeCloseTo(Math.sqrt(2 * 0.01 + (0.01 * 2) ** 2), 12);
    const alone = Math.sqrt(0.25 + 0.49 + 0.09 + 0.01);
    expect(standardUncertainty(ranked.get("A")?.score.effects ?? [])).toBeCloseTo(alone, 12);
  });
});

describe("a level that rests on a bound", () => {
  // 40 dB(A) read over 38: held at 1.2563 dB, so at or below 38.7437 dB(A); ISO 3744:2010 8.2.3.
  const bound = measuredPoint({ deltaTK: 30, levelReadDba: 40, backgroundDba: 38 });
  const determined = (levelReadDba: number) => measuredPoint({ deltaTK: 30, levelReadDba });

  it("can't win by less than its correction, and is a tie with whom it leads by less", () => {
    const round = scoreRound(roundInput({ bound: [bound], near: [determined(39.5)] }));
    expect(round.ranked.get("bound")).toMatchObject({ rank: 2, score: { upperBound: true } });
    expect(round.ranked.get("bound")?.score.value).toBeCloseTo(30 + 38.743724, 6);
    expect(round.ranked.get("near")?.rank).toBe(1);
    expect(round.comparisons[0]?.tie).toBe(true);
  });

  it("wins by more", () => {
    const round = scoreRound(roundInput({ bound: [bound], far: [determined(40.5)] }));
    expect(round.ranked.get("bound")?.rank).toBe(1);
    expect(round.comparisons[0]?.tie).toBe(false);
  });
});
