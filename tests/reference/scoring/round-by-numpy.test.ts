import { describe, expect, it } from "vitest";
import { standardUncertainty } from "@/lib/domain/results/effects";
import { reached } from "@/lib/domain/results/methods/v1/equal-noise";
import { parseRound } from "@/lib/domain/scoring/parse-round";
import { scoreRound } from "@/lib/domain/scoring/score-round";
import reference from "../values/round-by-numpy.json";

type ByName = Readonly<Record<string, number>>;

/** Draws of the reference; its standard deviations are known to 1/√(2N), 0.5 %. */
const REFERENCE_DRAWS = 20_000;

describe(`a round of two sessions against an independent calculation (${reference.source})`, () => {
  const round = scoreRound(parseRound(reference.input));
  const { expected } = reference;
  const of = (values: ByName, id: string) => values[id] ?? Number.NaN;

  it("reads the same ratios at every level and forms the same scores", () => {
    const ratios: Readonly<Record<string, number[]>> = expected.ratios;
    for (const [id, entry] of round.ranked) {
      const found = entry.equalNoise.filter(reached).map(({ ratio }) => ratio);
      expect(found).toHaveLength(3);
      found.forEach((ratio, i) => expect(ratio).toBeCloseTo(ratios[id]?.[i] ?? Number.NaN, 10));
      expect(entry.score.value).toBeCloseTo(of(expected.score, id), 10);
    }
    expect(round.ranked.size).toBe(5);
  });

  it("has scores and differences as uncertain as the scatter of the reference's draws, within 3 %", () => {
    for (const [id, { score }] of round.ranked)
      expect(Math.abs(standardUncertainty(score.effects) / of(expected.sd, id) - 1), id).toBeLessThan(0.03);
    for (const { a, b, u } of round.comparisons) {
      const sd = of(expected.sdOfDifference, `${a} ${b}`);
      expect(Math.abs(u / sd - 1), `${a} and ${b}`).toBeLessThan(0.03);
    }
  });

  it("has the reference's rank ranges, and its chances of first place within four standard errors", () => {
    const variance = 1 / REFERENCE_DRAWS + 1 / reference.input.draws;
    for (const [id, { spread }] of round.ranked) {
      expect([spread.low, spread.high], id).toEqual([of(expected.rankLow, id), of(expected.rankHigh, id)]);
      const p = of(expected.pFirst, id);
      expect(Math.abs(spread.pFirst - p)).toBeLessThanOrEqual(4 * Math.sqrt(p * (1 - p) * variance) + 1e-3);
    }
  });
});
