import { describe, expect, it } from "vitest";
import { standardUncertainty } from "@/lib/domain/results/effects";
import { baselineSubject, entrySubject, type MeasuredPoint } from "@/lib/domain/results/measured-point";
import { againstBaseline } from "@/lib/domain/results/methods/v1/against-baseline";
import { setSpeedPoints } from "@/lib/domain/results/methods/v1/set-speed-points";
import { measuredPoint } from "../../factories/measured-point";
import { num, nums, record, vector } from "../support/vectors";

function against(entry: MeasuredPoint, baseline: MeasuredPoint) {
  const [point] = setSpeedPoints(entrySubject("s1", "heronwing"), [entry], "engineering");
  const [below] = setSpeedPoints(baselineSubject("s1"), [baseline], "engineering");
  if (!point || !below) throw new Error("no point");
  return { point, below, ...againstBaseline(point, below) };
}

describe("an entry against the baseline of its session", () => {
  const difference = vector("T3-11");
  const shared = (inputs: typeof difference.inputs) => ({
    uDeltaTOwnK: num(inputs.u_random_each),
    uDeltaTOffsetK: num(inputs.u_shared_offset),
    uDeltaTGainRel: num(inputs.u_shared_gain_rel),
  });

  it(difference.title, () => {
    const { inputs, expected } = difference;
    const found = against(
      measuredPoint({ deltaTK: num(inputs.design), ...shared(inputs) }),
      measuredPoint({ deltaTK: num(inputs.baseline), ...shared(inputs) }),
    );
    const [uEntry, uBaseline] = nums(expected.u_each);
    expect(standardUncertainty(found.point.deltaTEffects)).toBeCloseTo(uEntry ?? Number.NaN, 10);
    expect(standardUncertainty(found.below.deltaTEffects)).toBeCloseTo(uBaseline ?? Number.NaN, 10);
    expect(found.deltaTDifferenceK.value).toBeCloseTo(num(expected.D), 10);
    expect(standardUncertainty(found.deltaTDifferenceK.effects)).toBeCloseTo(num(expected.u_D), 10);
  });

  const ratio = vector("T3-12");
  it(ratio.title, () => {
    const { inputs, expected } = ratio;
    const { resistanceRatio } = against(
      measuredPoint({ deltaTK: num(inputs.design), ...shared(inputs) }),
      measuredPoint({ deltaTK: num(inputs.baseline), ...shared(inputs) }),
    );
    expect(resistanceRatio.value).toBeCloseTo(num(expected.ratio), 10);
    expect(standardUncertainty(resistanceRatio.effects)).toBeCloseTo(num(expected.u_ratio), 10);
  });

  const power = vector("T1-33");
  it(power.title, () => {
    const design = record(power.inputs.design);
    const baseline = record(power.inputs.baseline);
    const { resistanceRatio } = against(
      measuredPoint({ deltaTK: num(design.dT_K), powerW: num(design.P_W) }),
      measuredPoint({ deltaTK: num(baseline.dT_K), powerW: num(baseline.P_W) }),
    );
    expect(resistanceRatio.value).toBeCloseTo(num(power.expected.r), 11);
  });

  it("cancels the calibration offset in a level difference, and no mount (handbook of metrology 1.4 and 3.3)", () => {
    const uncertain = { uLevelOffsetDb: 0.7, uLevelMountDb: 0.3, uLevelOwnDb: 0.1 };
    const { levelDifferenceDb } = against(
      measuredPoint({ levelReadDba: 33, ...uncertain }),
      measuredPoint({ levelReadDba: 35, ...uncertain }),
    );
    expect(levelDifferenceDb.value).toBeCloseTo(-2, 12);
    expect(standardUncertainty(levelDifferenceDb.effects)).toBeCloseTo(Math.sqrt(2 * (0.09 + 0.01)), 12);
  });
});
