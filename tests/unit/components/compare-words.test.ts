import { describe, expect, it } from "vitest";
import { equalCoolingWords, equalNoiseWords } from "@/components/compare/compare-words";
import { nameOf } from "@/components/compare/names";
import type { ComparedHead } from "@/lib/contracts/compare";

const name = (id: string) => ({ a: "Heronwing B", b: "Slow Mill A" })[id] ?? id;
const pair = { a: "a", b: "b" };

describe("a difference in words", () => {
  it("says tie where the data can't separate, and who is cooler where they can", () => {
    const tie = { value: -0.74, half95: 0.92, tie: true, p: 0.104 };
    expect(equalNoiseWords([{ ...pair, deltaTK: tie }], name, true)).toEqual([
      "Heronwing B and Slow Mill A differ by 0.7 ±0.9 K here. The data can’t separate them (p = 0.10): call it a tie.",
    ]);
    expect(
      equalNoiseWords([{ ...pair, deltaTK: { value: -1.6, half95: 0.9, tie: false, p: 0.0041 } }], name, true),
    ).toEqual(["Heronwing B is 1.6 ±0.9 K cooler than Slow Mill A here (p = 0.004)."]);
    expect(
      equalCoolingWords([{ ...pair, coolingDb: { value: 2.1, half95: 0.7, tie: false, p: 0.00001 } }], name),
    ).toEqual(["Heronwing B is 2.1 ±0.7 dB louder than Slow Mill A there (p under 0.001)."]);
  });

  it("calls a lead a tie that is within a bound's correction, whatever its p", () => {
    const bound = { value: -1.6, half95: 0.9, tie: true, p: 0.0041 };
    expect(equalNoiseWords([{ ...pair, deltaTK: bound }], name, true)).toEqual([
      "Heronwing B and Slow Mill A differ by 1.6 ±0.9 K here. The lead is within what a background correction could give: call it a tie.",
    ]);
  });

  it("is no K where the entries share no axis, and nothing where a level isn't reached", () => {
    const both = {
      ...pair,
      deltaTK: { value: -1, half95: 2, tie: true, p: 0.3 },
      percent: { value: 3, half95: 1, tie: false, p: 0.0002 },
    };
    expect(equalNoiseWords([both], name, false)).toEqual([
      "Heronwing B cools worse than Slow Mill A, by 3.0 ±1.0 % of the baseline’s ΔT/P, each at its season’s headline level (p under 0.001).",
    ]);
    expect(equalNoiseWords([pair], name, true)).toEqual([]);
  });
});

describe("an entry's name on the page", () => {
  it("has its season only where the same revision stands there twice", () => {
    const head = (seasonTitle: string, letter = "B") =>
      ({ slug: "heronwing", name: "Heronwing", letter, seasonTitle }) as ComparedHead;
    const [once, again, other] = [head("Season 3"), head("Season 4"), head("Season 4", "C")];
    expect(nameOf(once, [once, other])).toBe("Heronwing B");
    expect(nameOf(once, [once, again])).toBe("Heronwing B (Season 3)");
  });
});
