import { describe, expect, it } from "vitest";
import { effectiveDof, standardUncertainty, uncertaintyOfKind } from "@/lib/domain/results/effects";
import { entrySubject, type MeasuredPoint } from "@/lib/domain/results/measured-point";
import { setSpeedPoints } from "@/lib/domain/results/methods/v1/set-speed-points";
import { measuredPoint } from "../../factories/measured-point";

const subject = entrySubject("s1", "heronwing");
function only(points: readonly MeasuredPoint[], grade: "engineering" | "survey" = "engineering") {
  const [point] = setSpeedPoints(subject, points, grade);
  if (!point) throw new Error("no point");
  return point;
}

describe("points of one set speed and several mounts", () => {
  it("averages levels as energies: 34.2, 34.6, 33.9 dB give 34.24283 dB (ISO 3744:2010 Eq. (12))", () => {
    const point = only([34.2, 34.6, 33.9].map((level, i) => measuredPoint({ mount: i + 1, levelReadDba: level })));
    expect(point.correctedDba).toBeCloseTo(34.24283, 5);
    expect(point.mounts).toBe(3);
  });

  it("corrects for background point by point: 50 over 40 dB gives 49.542425 dB (ISO 3744:2010 Eq. (16))", () => {
    const point = only([measuredPoint({ levelReadDba: 50, backgroundDba: 40 })]);
    expect(point.correctedDba).toBeCloseTo(49.542425, 6);
    expect(point.correctionDb).toBeCloseTo(0.457575, 6);
    expect(point.upperBound).toBe(false);
  });

  it("holds the correction and says so below the grade's limit (ISO 3744:2010 8.2.3; ISO 3746:2010 8.3.3)", () => {
    const near = [measuredPoint({ levelReadDba: 50, backgroundDba: 45 })];
    expect(only(near)).toMatchObject({ upperBound: true });
    expect(only(near).correctedDba).toBeCloseTo(48.743724, 6);
    // ΔL = 5 dB is inside the survey grade: K₁ = −10 lg(1 − 10^−0.5) = 1.650885 dB, by hand.
    expect(only(near, "survey").correctedDba).toBeCloseTo(50 - 1.650885, 5);
    expect(only(near, "survey").upperBound).toBe(false);
  });

  it("is a bound as soon as one mount is", () => {
    const points = [45, 30].map((backgroundDba, i) => measuredPoint({ mount: i + 1, levelReadDba: 50, backgroundDba }));
    expect(only(points).upperBound).toBe(true);
  });

  it("averages repeats in a mount first, then mounts: (30 + 32)/2 and 34 K give 32.5 K", () => {
    const point = only([
      measuredPoint({ mount: 1, deltaTK: 30 }),
      measuredPoint({ mount: 1, deltaTK: 32 }),
      measuredPoint({ mount: 2, deltaTK: 34 }),
    ]);
    expect(point.deltaTK).toBeCloseTo(32.5, 12);
  });

  it("gives u² = s_mount²/m + s_rep²/(mk) + offset² + gain² (handbook of metrology 3.3; JCGM 100:2008 eq. 10)", () => {
    // m = 3 mounts, k = 2 repeats, s_mount 0.3, s_rep 0.1, offset 0.2 K, gain 0.5 % of 40 K: by hand
    // 0.09/3 + 0.01/6 + 0.04 + 0.04 = 0.1116666… K², u = 0.3341656276 K.
    const points = [1, 1, 2, 2, 3, 3].map((mount) =>
      measuredPoint({
        mount,
        deltaTK: 40,
        uDeltaTOwnK: 0.1,
        uDeltaTMountK: 0.3,
        uDeltaTOffsetK: 0.2,
        uDeltaTGainRel: 0.005,
      }),
    );
    const { deltaTEffects } = only(points);
    expect(standardUncertainty(deltaTEffects)).toBeCloseTo(0.3341656276, 9);
    expect(uncertaintyOfKind(deltaTEffects, "own_run")).toBeCloseTo(0.1 / Math.sqrt(6), 12);
    expect(uncertaintyOfKind(deltaTEffects, "own_mount")).toBeCloseTo(0.3 / Math.sqrt(3), 12);
    expect(uncertaintyOfKind(deltaTEffects, "shared_offset")).toBeCloseTo(0.2, 12);
    expect(uncertaintyOfKind(deltaTEffects, "shared_gain")).toBeCloseTo(0.2, 12);
  });

  it("weighs each level's error with its share of the energy: 10 and 1 of 11 at levels 10 dB apart (by hand)", () => {
    const points = [50, 40].map((level, i) => measuredPoint({ mount: i + 1, levelReadDba: level, uLevelOwnDb: 0.5 }));
    const { levelEffects } = only(points);
    expect(standardUncertainty(levelEffects)).toBeCloseTo((0.5 * Math.sqrt(101)) / 11, 12);
  });

  it("has the degrees of freedom of eq. G.2b: two mounts of 8 each make 16; the offset is taken as known", () => {
    const mounts = [1, 2].map((mount) => measuredPoint({ mount, uDeltaTMountK: 0.3, dof: 8 }));
    expect(effectiveDof(only(mounts).deltaTEffects)).toBeCloseTo(16, 12);
    // Mean of two: 0.3²/2 = 0.045 K² from the mounts, 0.045 K² from an offset of √0.045 K: (0.09)²/(0.045²/16) = 64.
    const withOffset = mounts.map((point) => ({ ...point, uDeltaTOffsetK: Math.sqrt(0.045) }));
    expect(effectiveDof(only(withOffset).deltaTEffects)).toBeCloseTo(64, 9);
  });
});
