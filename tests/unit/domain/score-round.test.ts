import { describe, expect, it } from "vitest";
import { standardUncertainty } from "@/lib/domain/results/effects";
import { roundAnswer } from "@/lib/domain/scoring/round-answer";
import { scoreRound } from "@/lib/domain/scoring/score-round";
import type { RoundInput } from "@/lib/domain/scoring/round-input";
import { measuredCurve } from "../../factories/measured-point";
import { roundInput } from "../../factories/round-input";

const uncertain = { uLevelOwnDb: 0.1, uLevelMountDb: 0.15, uDeltaTOwnK: 0.1, uDeltaTMountK: 0.2, dof: 9 };
const EQUAL_NOISE = { kind: "equal-noise", levelsDba: [32, 38] } as const;
const LEVELS = [30, 35, 40];

const round = (changes: Partial<RoundInput> = {}) =>
  roundInput(
    {
      heronwing: measuredCurve(LEVELS, [36, 30, 27], uncertain),
      osier: measuredCurve(LEVELS, [36.2, 30.1, 27.2], uncertain),
      loud: measuredCurve([36, 38, 40], [31, 29, 28], uncertain),
    },
    { rule: EQUAL_NOISE, ...changes },
    measuredCurve(LEVELS, [40, 34, 30], uncertain),
  );

describe("a scored round", () => {
  it("lists who doesn't reach every level, with the level, and ranks the others without it", () => {
    const { entries, comparisons } = roundAnswer(scoreRound(round()));
    expect(entries[2]).toMatchObject({
      whyNotRanked: "not reached at 32 dB(A)",
      score: null,
      rank: null,
      pFirst: null,
      letters: null,
    });
    expect(entries[2]?.equalNoise[0]).toEqual({ levelDba: 32, why: "entry-not-reached" });
    expect(entries[2]?.equalNoise[1]).toHaveProperty("ratio");
    expect(entries.map(({ rank }) => rank)).toEqual([1, 2, null]);
    expect(comparisons).toHaveLength(1);
  });

  it("gives the same digits for the same seed and other ranges for other errors only", () => {
    const answer = (seed: number) => roundAnswer(scoreRound(round({ seed })));
    expect(answer(3)).toEqual(answer(3));
    const [a, b] = [answer(3), answer(4)].map(({ entries }) => entries.map(({ score, uScore }) => [score, uScore]));
    expect(a).toEqual(b);
  });

  it("lets the baseline's own error alone change no order: every draw ranks alike", () => {
    const input = roundInput(
      { a: measuredCurve(LEVELS, [36, 30, 27]), b: measuredCurve(LEVELS, [36.001, 30.001, 27.001]) },
      { rule: EQUAL_NOISE, draws: 500 },
      measuredCurve(LEVELS, [40, 34, 30], { uDeltaTOwnK: 1, uDeltaTMountK: 1 }),
    );
    const { ranked } = scoreRound(input);
    expect(ranked.get("a")?.spread).toEqual({ low: 1, high: 1, pFirst: 1, counts: expect.anything() as unknown });
  });

  it("scores over a bridge with its uncertainty, and lists an entry without one", () => {
    const input = round();
    const [first] = input.sessions;
    if (!first) throw new Error("no session");
    const second = { ...first, id: "s2", baseline: { ...first.baseline, unit: "B-02" } };
    const entries = first.entries.slice(0, 1).map((entry) => ({ ...entry, id: "reed" }));
    const sessions = [first, { ...second, entries }];
    const alone = scoreRound({ ...input, sessions });
    expect(alone.sessions[1]?.entries[0]?.whyNotRanked).toBe("other baseline");

    const bridge = { fromUnit: "B-02", toUnit: "B-01", ratio: 1.02, u: 0.01, dof: 12 };
    const over = scoreRound({ ...input, sessions, bridges: [bridge] });
    const own = over.ranked.get("heronwing")?.score;
    const reed = over.ranked.get("reed")?.score;
    expect(reed?.value).toBeCloseTo(1.02 * (own?.value ?? Number.NaN), 12);
    const u = standardUncertainty(own?.effects ?? []);
    expect(standardUncertainty(reed?.effects ?? [])).toBeCloseTo(Math.hypot(1.02 * u, 0.01 * (own?.value ?? 0)), 12);
  });

  it("reads all of one rule's entries by the mean over their set speeds where there are several", () => {
    const { ranked } = scoreRound(round({ rule: { kind: "plain-sum", levelsDba: [] } }));
    expect(ranked.get("heronwing")?.score.value).toBeCloseTo((66 + 65 + 67) / 3, 12);
  });

  it("answers a round without entries", () => {
    expect(roundAnswer(scoreRound(roundInput({})))).toMatchObject({ entries: [], comparisons: [] });
  });
});
