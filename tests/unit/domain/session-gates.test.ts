import { describe, expect, it } from "vitest";
import { sessionGates, type GateInput } from "@/lib/domain/bench/session-gates";

/** A session that passes everything. s_r of 0.2 dB and 0.1 K give limits of 0.56 dB and 0.28 K (r = 2.8 s_r). */
const passed: GateInput = {
  calibratorLevelDb: 94,
  calibratorDriftMaxDb: 0.5,
  ambientMinC: 18,
  ambientMaxC: 28,
  positions: ["on axis"],
  calibrator: [
    { position: "on axis", phase: "before", valueDb: 94.1 },
    { position: "on axis", phase: "after", valueDb: 93.6 },
  ],
  background: [{ position: "on axis", valueDba: 22.4 }],
  ambientC: [18, 21.4, 28],
  baseline: [{ setSpeed: 1450, levelsDba: [45, 45.2, 45.55], deltaTK: [30, 30.5, 30.27] }],
  baselineFirst: true,
  baselineLast: true,
  repeatabilityDb: 0.2,
  repeatabilityK: 0.1,
};
const codes = (change: Partial<GateInput>) => sessionGates({ ...passed, ...change }).map((found) => found.code);
const calibrator = (beforeDb: number, afterDb: number): Partial<GateInput> => ({
  calibrator: [
    { position: "on axis", phase: "before", valueDb: beforeDb },
    { position: "on axis", phase: "after", valueDb: afterDb },
  ],
});

describe("gates of a session", () => {
  it("let a session by whose figures lie on the limits", () => {
    expect(sessionGates(passed)).toEqual([]);
  });

  it("pass calibrator drifts of 0.3 and 0.2 dB and refuse 0.6 dB (limit 0.5 dB, ISO 3744:2010 5.2: value from memory)", () => {
    expect(
      [[94, 94.3] as const, [94, 94.6] as const, [94.1, 93.9] as const].map(([a, b]) => codes(calibrator(a, b))),
    ).toEqual([[], ["calibrator"], []]);
    expect(codes(calibrator(94.6, 94.6))).toEqual(["calibrator"]);
  });

  it("take the newest calibrator reading of each phase", () => {
    const twice = [{ position: "on axis", phase: "before" as const, valueDb: 92 }, ...passed.calibrator];
    expect(codes({ calibrator: twice })).toEqual([]);
  });

  // r = 2.8 s_r: ISO 5725-6:1994, 4.1.4 (clause from memory). 2.8 × 0.2 = 0.56 dB, 2.8 × 0.1 = 0.28 K.
  it.each([
    [[45, 45.56], [30, 30], []],
    [[45, 45.57], [30, 30], ["baseline"]],
    [[45, 45], [30, 30.29], ["baseline"]],
    [[45], [30], ["baseline"]],
    [[], [], ["baseline"]],
  ])("hold a baseline whose first and last mounts read %j dB(A) and %j K: %j", (levelsDba, deltaTK, expected) => {
    expect(codes({ baseline: [{ setSpeed: 1450, levelsDba, deltaTK }] })).toEqual(expected);
  });

  it.each([
    [{ ambientC: [21, 28.1] }, ["ambient"]],
    [{ ambientC: [] }, ["ambient"]],
    [{ calibrator: [] }, ["calibrator"]],
    [{ background: [] }, ["background"]],
    [{ baselineFirst: false }, ["baseline"]],
    [{ baselineLast: false }, ["baseline"]],
    [{ positions: ["on axis", "at 45°"] }, ["calibrator", "background"]],
  ] as const)("name what is wrong in %j", (change, expected) => {
    expect(codes(change)).toEqual(expected);
  });

  it("say what was found and what to do", () => {
    expect(sessionGates({ ...passed, ...calibrator(94, 94.6) })).toMatchObject([
      {
        reason: "The calibrator moved by 0.6 dB (on axis); the limit is 0.5 dB.",
        whatToDo: expect.stringMatching(/calibrate/),
      },
    ]);
  });
});
