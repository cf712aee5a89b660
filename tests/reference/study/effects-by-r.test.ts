import { describe, expect, it } from "vitest";
import { fitEffects, type EffectsFit } from "@/lib/domain/study/effects";
import { study } from "@/lib/domain/study/study";
import type { StudyEntry } from "@/lib/domain/study/study-entry";
import { studyEntry } from "../../factories/study-entry";
import recorded from "../values/trait-effects-by-r.json";

const at = (values: readonly number[], i: number) => values[i] ?? Number.NaN;

/** The rows that R read, as entries; designers numbered modulo `designers` as in the script. */
const entries = (designers: number): StudyEntry[] =>
  recorded.rows.ratio.map((ratio, i) =>
    studyEntry({
      entryId: `entry ${i}`,
      seasonNumber: at(recorded.rows.season, i),
      designer: `designer ${at(recorded.rows.designer, i) % designers}`,
      bladesFirst: at(recorded.rows.blades, i),
      inletStack: recorded.rows.inlet[i] ?? "",
      tipGapMm: at(recorded.rows.gap, i),
      ratio,
    }),
  );

/** Steps of the four effects: a blade, two kinds, a tenth of a millimetre. */
const steps = [1, 1, 1, 0.1];
const percent = (beta: number, i: number) => 100 * Math.expm1(beta * at(steps, i));
const inROrder = (fit: EffectsFit) =>
  recorded.effects.map((key) => {
    const found = fit.effects.find((effect) => effect.key === key);
    if (!found) throw new Error(`no effect ${key}`);
    return found;
  });

describe(`effects with a level a cell and designers as clusters, against ${recorded.source}`, () => {
  const all = entries(1000);
  const fit = fitEffects(["blades", "inlet", "gap"], "equal", all, 1);

  it("has R's slopes, intervals and p with 30 designers or more", () => {
    expect(fit).toMatchObject({ errors: "cluster-t", designers: recorded.designers, cells: 4, n: 96 });
    expect(recorded.designers).toBeGreaterThanOrEqual(30);
    expect(fit.dof).toBe(recorded.dof);
    expect(fit.residualSd).toBeCloseTo(recorded.sigma, 12);
    inROrder(fit).forEach((effect, i) => {
      expect(effect.estimate).toBeCloseTo(percent(at(recorded.beta, i), i), 9);
      expect(effect.low).toBeCloseTo(percent(at(recorded.low, i), i), 9);
      expect(effect.high).toBeCloseTo(percent(at(recorded.high, i), i), 9);
      expect(effect.p).toBeCloseTo(at(recorded.p, i), 9);
    });
  });

  it("has R's adjusted p (p.adjust, BH): of all traits, only these vary in its rows, so four are tried", () => {
    const whole = study({ traits: [], outcome: "equal" }, all, []);
    expect(whole.tried).toBe(4);
    inROrder(whole.fit).forEach((effect, i) => expect(effect.q).toBeCloseTo(at(recorded.q, i), 9));
    expect(whole.fit.effects.filter(({ why }) => why === "one-value").map(({ key }) => key)).toContain("struts");
  });

  it("has R's bootstrap p and quantile over all 2⁸ signs with eight designers", () => {
    const few = fitEffects(["blades", "inlet", "gap"], "equal", entries(recorded.wildDesigners), 1);
    expect(few).toMatchObject({ errors: "wild-bootstrap", designers: 8, draws: 256 });
    inROrder(few).forEach((effect, i) => {
      expect(effect.p, effect.key).toBeCloseTo(at(recorded.wildP, i), 12);
      const slope = Math.log1p((effect.estimate ?? 0) / 100);
      const reach = Math.log1p((effect.high ?? 0) / 100) - slope;
      const below = slope - Math.log1p((effect.low ?? 0) / 100);
      const expected = at(recorded.wildQuantile, i) * at(recorded.wildCr1, i) * at(steps, i);
      expect(reach, effect.key).toBeCloseTo(expected, 9);
      expect(below, effect.key).toBeCloseTo(expected, 9);
      // Estimate ± quantile · error: the same p = 0.05 that the signs give.
      expect(reach > Math.abs(slope), effect.key).toBe((effect.p ?? 0) > 0.05);
    });
  });
});
