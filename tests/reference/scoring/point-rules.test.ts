import { describe, expect, it } from "vitest";
import { pointScore, type PointRuleKind } from "@/lib/domain/scoring/rules";
import { scoreRound } from "@/lib/domain/scoring/score-round";
import { onePointEntries, roundInput } from "../../factories/round-input";
import { num, nums, record, vector } from "../support/vectors";

describe("point rules, one set speed", () => {
  const rules = vector("T11-01");
  const entries = onePointEntries(
    Object.fromEntries(
      Object.entries(record(rules.inputs.entries)).map(([id, entry]) => {
        const { dT_K, L_dBA } = record(entry);
        return [id, [num(dT_K), num(L_dBA)] as const];
      }),
    ),
  );

  it.each([
    ["plain-sum", "sum"],
    ["plain-product", "product"],
    ["conductance-less-level", "ten_lgG_minus_L"],
  ] as const)(`%s: ${rules.title}`, (kind, column) => {
    const { ranked } = scoreRound(roundInput(entries, { rule: { kind, levelsDba: [] }, draws: 1 }));
    for (const [id, expected] of Object.entries(record(rules.expected[column])))
      expect(ranked.get(id)?.score.value).toBeCloseTo(num(expected), 9);
  });

  it("ranks the lower sum and the higher conductance first, and equal sums alike (T11-01 by hand)", () => {
    const ranks = (kind: PointRuleKind) => {
      const { ranked } = scoreRound(roundInput(entries, { rule: { kind, levelsDba: [] }, draws: 1 }));
      return [...ranked.values()].map(({ id, rank }) => `${id}${rank}`).join(" ");
    };
    expect(ranks("plain-sum")).toBe("A1 B1 C4 D5 E3");
    expect(ranks("plain-product")).toBe("A3 B2 C4 D5 E1");
    expect(ranks("conductance-less-level")).toBe("A3 B2 C5 D4 E1");
  });

  const units = vector("T11-02");
  it(units.title, () => {
    const sums = [units.inputs.A, units.inputs.B].map(nums).map(([deltaTK = Number.NaN, levelDba = Number.NaN]) => {
      const score = (size: number) => pointScore("plain-sum", { deltaTK: deltaTK * size, levelDba, powerW: 100 }).score;
      return [score(1), score(1.8)];
    });
    expect(sums.map(([kelvin]) => kelvin)).toEqual(nums(units.expected.sum_K));
    nums(units.expected.sum_F).forEach((sum, i) => expect(sums[i]?.[1]).toBeCloseTo(sum, 9));
  });

  const speed = vector("T11-06");
  it(speed.title, () => {
    const slow = { deltaTK: 36, levelDba: 34, powerW: 100 };
    const fast = {
      ...slow,
      deltaTK: 36 * num(speed.expected.dT_factor),
      levelDba: 34 + num(speed.expected.dL),
    };
    const change = (kind: PointRuleKind) =>
      pointScore(kind, fast, num(speed.inputs.m)).score - pointScore(kind, slow, num(speed.inputs.m)).score;
    expect(change("conductance-less-level")).toBeCloseTo(num(speed.expected.change_10lgG_minus_L), 9);
    expect(change("speed-neutral")).toBeCloseTo(0, 9);
  });

  it.each(["plain-sum", "plain-product", "conductance-less-level", "speed-neutral"] as const)(
    "%s has the derivatives of its own formula (central differences)",
    (kind) => {
      const point = { deltaTK: 36, levelDba: 34, powerW: 100 };
      const at = (dL: number, dT: number) =>
        pointScore(kind, { ...point, levelDba: 34 + dL, deltaTK: 36 + dT }, 0.6).score;
      const { byLevel, byDeltaT } = pointScore(kind, point, 0.6);
      expect(byLevel).toBeCloseTo((at(1e-4, 0) - at(-1e-4, 0)) / 2e-4, 6);
      expect(byDeltaT).toBeCloseTo((at(0, 1e-4) - at(0, -1e-4)) / 2e-4, 6);
    },
  );
});
