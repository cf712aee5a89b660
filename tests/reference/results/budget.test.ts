import { describe, expect, it } from "vitest";
import { budgetLines } from "@/lib/domain/results/budget";
import { baselineSubject, entrySubject } from "@/lib/domain/results/measured-point";
import { againstBaseline } from "@/lib/domain/results/methods/v1/against-baseline";
import { setSpeedPoints } from "@/lib/domain/results/methods/v1/set-speed-points";
import { measuredPoint } from "../../factories/measured-point";

describe("the budget of a difference", () => {
  // The pair of check value T3-11: own 0.2 K each, offset 0.3 K, gain 0.5 %, 36.4 against 40.0 K (JCGM 100:2008, F.1.2.3).
  const parts = { uDeltaTOwnK: 0.2, uDeltaTOffsetK: 0.3, uDeltaTGainRel: 0.005, dof: 12 };
  const [entry] = setSpeedPoints(
    entrySubject("s1", "reed"),
    [measuredPoint({ deltaTK: 36.4, ...parts })],
    "engineering",
  );
  const [baseline] = setSpeedPoints(baselineSubject("s1"), [measuredPoint({ deltaTK: 40, ...parts })], "engineering");
  const lines =
    entry && baseline
      ? budgetLines(againstBaseline(entry, baseline).deltaTDifferenceK.effects, entry.deltaTEffects)
      : [];
  const line = (kind: string, owner: string) => lines.find((each) => each.kind === kind && each.owner === owner);

  it("says that the offset is gone, the gain smaller, and own parts stay, with their sizes by hand", () => {
    expect(line("shared_offset", "s1")).toMatchObject({ u: 0, cancels: "fully", uAlone: 0.3 });
    expect(line("shared_gain", "s1")).toMatchObject({ cancels: "partly" });
    expect(line("shared_gain", "s1")?.u).toBeCloseTo(3.6 * 0.005, 12);
    expect(line("shared_gain", "s1")?.uAlone).toBeCloseTo(36.4 * 0.005, 12);
    expect(line("own_run", "entry reed")).toMatchObject({ u: 0.2, cancels: "no", dof: 12 });
    expect(line("own_run", "baseline s1")).toMatchObject({ u: 0.2, cancels: "no", uAlone: undefined });
  });

  it("has shares of the variance that add to 1, the largest first", () => {
    expect(lines.reduce((sum, { share }) => sum + share, 0)).toBeCloseTo(1, 12);
    expect(line("own_run", "entry reed")?.share).toBeCloseTo(0.04 / (0.08 + 0.018 ** 2), 12);
    expect(lines.map(({ u }) => u)).toEqual(lines.map(({ u }) => u).sort((a, b) => b - a));
  });
});
