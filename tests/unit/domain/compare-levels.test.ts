import { describe, expect, it } from "vitest";
import { entryToken, parseEntryToken } from "@/lib/domain/designs/entry-token";
import { comparabilityOf, readingLevel, sliderEnds } from "@/lib/domain/results/compare-levels";
import { layOver } from "@/lib/domain/results/lay-over";
import { measuredCurve } from "../../factories/measured-point";

const over = (entry: readonly number[], baseline: readonly number[]) =>
  layOver({
    entries: [{ id: "a", sessionId: "s", points: measuredCurve(entry, [60, 50, 45]) }],
    sessions: [{ id: "s", grade: "engineering", baselinePoints: measuredCurve(baseline, [62, 52, 47]) }],
  });

describe("the level that a comparison is read at", () => {
  it("takes whole tenths that both curves reach", () => {
    expect(sliderEnds(over([35.17, 45, 52.04], [33, 46, 55]))).toEqual({ low: 35.2, high: 52 });
  });

  it("is the headline level unless another is asked for, moved to the nearest end where it lies outside", () => {
    const laid = over([35, 45, 52], [33, 46, 55]);
    const at = (asked: number | undefined) => readingLevel(laid, { asked, headlineDba: 46 });
    expect([at(undefined), at(40.04), at(20), at(90)]).toEqual([46, 40, 35, 52]);
  });

  it("is the headline level where no level is shared", () => {
    const apart = over([20, 22, 24], [33, 46, 55]);
    expect(sliderEnds(apart)).toBeUndefined();
    expect(readingLevel(apart, { asked: 22, headlineDba: 46 })).toBe(46);
  });
});

describe("what may stand side by side", () => {
  const entry = { benchVersionId: "b1", protocolVersionId: "p1", baselineUnitId: "u1" };

  it("is one axis only within one bench version, protocol and baseline unit", () => {
    expect(comparabilityOf([entry, entry])).toBe("same-axis");
    expect(comparabilityOf([entry, { ...entry, benchVersionId: "b2" }])).toBe("ratios");
    expect(comparabilityOf([entry, { ...entry, protocolVersionId: "p2" }])).toBe("ratios");
    expect(comparabilityOf([entry, { ...entry, baselineUnitId: "u2" }])).toBe("not-comparable");
  });
});

describe("an entry's name in an address", () => {
  it("comes back from what was written, in any case and with colons", () => {
    const name = { slug: "slow-mill-2", letter: "B", seasonSlug: "season-4" };
    expect(entryToken(name)).toBe("slow-mill-2.b.season-4");
    expect(parseEntryToken(entryToken(name))).toEqual(name);
    expect(parseEntryToken("Slow-Mill-2:B:Season-4")).toEqual(name);
  });

  it("is none where a part is missing or can be no slug", () => {
    for (const text of ["", "slow-mill", "slow-mill.b", "a.b.c.d", "-x.b.season-4", "x.1.season-4", "x.b.' or 1=1"])
      expect(parseEntryToken(text), text).toBeUndefined();
  });
});
