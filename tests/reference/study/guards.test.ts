import { describe, expect, it } from "vitest";
import { distributionOf, spreadOf } from "@/lib/domain/study/distribution";
import { fitEffects } from "@/lib/domain/study/effects";
import { levelsOf } from "@/lib/domain/study/levels";
import { createRandom } from "@/lib/science/statistics/random";
import { studyEntry } from "../../factories/study-entry";

/** Forty entries over two seasons by ten designers; `make` says what the i-th is. */
const forty = (make: (i: number, season: number) => Parameters<typeof studyEntry>[0]) => {
  const random = createRandom(5);
  return Array.from({ length: 40 }, (_, i) => {
    const made = make(i, i < 20 ? 1 : 2);
    const noise = 0.002 * random.normal();
    return studyEntry({
      entryId: `${i}`,
      seasonNumber: i < 20 ? 1 : 2,
      designer: `designer ${i % 10}`,
      ...made,
      ratio: (made?.ratio ?? 1) * Math.exp(noise),
    });
  });
};

describe("what the study refuses to say", () => {
  it("says when the direction over all is against the one within seasons (E. H. Simpson 1951)", () => {
    // Within a season each blade costs 1 %; the second season has more blades and is 20 % better for another reason.
    const entries = forty((i, season) => ({
      bladesFirst: 5 + (i % 4) + (season === 2 ? 4 : 0),
      ratio: Math.exp(0.01 * (i % 4) - (season === 2 ? 0.2 : 0)),
    }));
    const [effect] = fitEffects(["blades"], "equal", entries, 1).effects;
    expect(effect).toMatchObject({ reversed: true, cellsUp: 2, cellsDown: 0 });
    expect(effect?.pooled).toBeLessThan(0);
    expect(effect?.estimate).toBeGreaterThan(0);
  });

  it("refuses a trait that varies within no cell, and says so", () => {
    const entries = forty((i, season) => ({ bladesFirst: season === 1 ? 7 : 9, struts: i % 5 }));
    const fit = fitEffects(["blades", "struts"], "equal", entries, 1);
    expect(fit.effects.map(({ key, why, estimate }) => [key, why, estimate !== undefined])).toEqual([
      ["blades", "varies-in-no-cell", false],
      ["struts", undefined, true],
    ]);
  });

  it("refuses a trait that another one says already (handbook 10.2: VIF over 10)", () => {
    const entries = forty((i) => ({ struts: i % 5, bladesFirst: 5 + (i % 5) + (i === 7 ? 1 : 0) }));
    const fit = fitEffects(["struts", "blades"], "equal", entries, 1);
    expect(fit.effects.filter(({ why }) => why === "not-apart")).toHaveLength(1);
    expect(fit.effects.filter(({ estimate }) => estimate !== undefined)).toHaveLength(1);
  });

  it("gives no effect of fewer than six designers, nor of a kind that fewer than four entries have", () => {
    const five = forty((i) => ({ designer: `designer ${i % 5}`, struts: i % 3 }));
    expect(fitEffects(["struts"], "equal", five, 1).effects[0]).toMatchObject({ why: "too-few-designers" });
    const rare = forty((i) => ({ material: i < 3 ? "PC" : i % 2 ? "PETG" : "PLA" }));
    const fit = fitEffects(["material"], "equal", rare, 1);
    expect(fit.effects.find(({ level }) => level === "PC")).toMatchObject({ n: 3, why: "too-few" });
    expect(fit.leftOut).toBe(3);
  });

  it("shows dots alone under four values, a median from four, its interval from six (handbook 10.5)", () => {
    expect(spreadOf([3, 1, 2])).toEqual({ n: 3, values: [1, 2, 3] });
    expect(spreadOf([3, 1, 2, 4])).toMatchObject({ n: 4, median: 2.5, low: undefined });
    // Smallest and largest of six: 2/2⁶ = 0.031 lies outside.
    expect(spreadOf([6, 3, 1, 2, 4, 5])).toMatchObject({ n: 6, median: 3.5, low: 1, high: 6 });
    expect(spreadOf([])).toEqual({ n: 0, values: [] });
  });

  it("loses no entry between bands, and puts each into one", () => {
    const random = createRandom(8);
    const entries = forty(() => ({ tipGapMm: 0.3 + random.uniform() }));
    const levels = levelsOf("gap", entries);
    expect(levels).toHaveLength(4);
    expect(levels.flatMap(({ entries: of }) => of.map(({ entryId }) => entryId)).sort()).toEqual(
      entries.map(({ entryId }) => entryId).sort(),
    );
    const { bins, levels: spread } = distributionOf("gap", "equal", entries);
    expect(bins.count).toBeLessThanOrEqual(22);
    expect(spread.flatMap(({ counts }) => counts ?? []).reduce((a, b) => a + b, 0)).toBe(40);
  });
});
