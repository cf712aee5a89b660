import { describe, expect, it } from "vitest";
import { backgroundCorrection } from "@/lib/science/acoustics/levels";
import { pooledMountSd, mountPart } from "@/lib/domain/results/methods/v1/mount-spread";
import { correctionSensitivity, sessionPoints } from "@/lib/domain/results/methods/v1/session-points";
import type { SessionRecord } from "@/lib/domain/results/session-record";
import golden from "../../recorded/method-v1.json";

const session = golden.session as unknown as SessionRecord;

describe("what a level's error becomes when the background is taken off", () => {
  it.each([
    [36, 30],
    [40, 30],
    [44.9, 30],
  ])("is the slope of the correction itself at %s over %s dB (central difference)", (read, background) => {
    const at = (measuredDb: number) =>
      backgroundCorrection({ measuredDb, backgroundDb: background, grade: "engineering" }).correctedDb;
    const step = 1e-5;
    // From the upper side at 6 dB, where the correction begins to be held.
    const slope = (at(read + 2 * step) - at(read + step)) / step;
    expect(correctionSensitivity(read, background, "engineering")).toBeCloseTo(slope, 3);
  });

  it("is 4/3 at a margin of 6.0206 dB, by hand: 1/(1 − 1/4)", () => {
    expect(correctionSensitivity(30 + 20 * Math.log10(2), 30, "engineering")).toBeCloseTo(4 / 3, 9);
  });

  it("is 1 where nothing is corrected, where the correction is held, and without a background", () => {
    expect(correctionSensitivity(50, 30, "engineering")).toBe(1);
    expect(correctionSensitivity(33, 30, "engineering")).toBe(1);
    expect(correctionSensitivity(33, null, "engineering")).toBe(1);
  });
});

describe("the points of a session", () => {
  const { subjects, leftOut } = sessionPoints(session, ["axis", "side"]);
  const of = (key: string) => subjects.find((subject) => subject.key === key)?.points ?? [];

  it("takes the energy mean of the positions (ISO 3744:2010 Eq. (12)): of 29.40 and 28.95 dB(A)", () => {
    const [first] = of("unit-1");
    const [axis, side] = [29.4, 28.95];
    expect(first?.levelReadDba).toBeCloseTo(10 * Math.log10((10 ** (axis / 10) + 10 ** (side / 10)) / 2), 9);
  });

  it("takes ΔT from the log, with the log's u, what the gate left ÷ √3 and the budget's part (JCGM 100:2008, 4.3.7)", () => {
    expect(of("unit-1")[0]?.uDeltaTOwnK).toBeCloseTo(Math.sqrt(0.06 ** 2 + 0.03 ** 2 + 0.06 ** 2 / 3), 12);
  });

  it("takes ΔT from sensor less ambient where there is no log, and then has the budget's part alone", () => {
    const typed = of("heronwing").filter(({ mount }) => mount === 2);
    expect(typed[0]?.deltaTK).toBeCloseTo(41.2 * 0.97, 1);
    expect(typed[0]?.uDeltaTOwnK).toBeCloseTo(0.06, 12);
  });

  it("leaves a run without a rise out and names it, and never counts a discarded one", () => {
    expect(leftOut).toEqual([{ runId: "run-29", why: "no temperature rise" }]);
    expect(of("slow-mill").map(({ setSpeedRpm }) => setSpeedRpm)).toEqual([900, 910, 1600, 2100]);
  });
});

describe("the spread between mounts", () => {
  it("is pooled: of (30, 32) and (40, 41, 42), by hand √((2 + 2)/(1 + 2)), three degrees of freedom", () => {
    const pooled = pooledMountSd([
      { subject: "a", means: [30, 32] },
      { subject: "b", means: [40, 41, 42] },
    ]);
    expect(pooled?.s).toBeCloseTo(Math.sqrt(4 / 3), 12);
    expect(pooled?.dof).toBe(3);
    expect(pooledMountSd([{ subject: "a", means: [30] }])).toBeUndefined();
  });

  it("is the larger of the budget's and what is left of it without single runs' scatter (by hand 0.4² = 0.5² − 0.3²)", () => {
    const own = { u: 0.3, dof: 9 };
    const larger = mountPart({ u: 0.2, dof: 9 }, own, { s: 0.5, dof: 4 });
    expect(larger.u).toBeCloseTo(0.4, 12);
    expect(larger.dof).toBe(4);
    expect(mountPart({ u: 0.6, dof: 9 }, own, { s: 0.5, dof: 4 })).toEqual({ u: 0.6, dof: 9 });
  });
});
