import { describe, expect, it } from "vitest";
import { missingRuns } from "@/lib/domain/bench/missing-runs";
import { planBench } from "@/lib/domain/bench/planner";
import type { Protocol } from "@/lib/domain/bench/protocol";

const protocol: Protocol = {
  setSpeeds: [1800, 900, 1300],
  mounts: 3,
  runsPerMount: 1,
  minutesPerRun: 12,
  minutesPerMount: 15,
  ambientMinC: 18,
  ambientMaxC: 28,
  ambientDriftMaxK: 0.5,
  calibratorDriftMaxDb: 0.5,
};

describe("bench hours", () => {
  it("are those of mounts, runs and the baseline's two turns, by hand", () => {
    // An entry: 3 × (15 + 3 × 12) = 153 min; baselines of a session: 2 × 51 = 102 min. 8 h hold two entries.
    expect(planBench(protocol, 5, 8)).toEqual({
      hoursPerEntry: 2.55,
      entriesPerSession: 2,
      sessions: 3,
      hours: (5 * 153 + 3 * 102) / 60,
    });
    expect(planBench(protocol, 0, 8)).toMatchObject({ sessions: 0, hours: 0 });
  });

  it("can't be planned where no entry goes into a session", () => {
    expect(planBench(protocol, 5, 4)).toBeUndefined();
  });
});

describe("missing runs", () => {
  it("are all mounts at rising speeds at first, and none when all is done", () => {
    const all = missingRuns(protocol, []);
    expect(all.map(({ mount, setSpeed }) => `${mount}@${setSpeed}`).slice(0, 4)).toEqual([
      "1@900",
      "1@1300",
      "1@1800",
      "2@900",
    ]);
    expect(missingRuns(protocol, all)).toEqual([]);
  });

  it("keep a mount's number when an earlier one was discarded", () => {
    const done = [2, 3].flatMap((mount) => protocol.setSpeeds.map((setSpeed) => ({ setSpeed, mount })));
    expect(missingRuns(protocol, done).map(({ mount }) => mount)).toEqual([1, 1, 1]);
    expect(missingRuns({ ...protocol, runsPerMount: 2 }, done.slice(0, 1))[0]).toEqual({
      setSpeed: 900,
      mount: 2,
      runs: 2,
    });
  });
});
