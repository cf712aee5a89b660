import { describe, expect, it } from "vitest";
import { tryProperties, type Property } from "@/lib/domain/scoring/properties";
import type { RuleKind } from "@/lib/domain/scoring/rules";

// Handbook of metrology 11.1, table of rules (derived there): monotone in both, unit-invariant, order of two unaffected
// by others, neutral to own speed.
const TABLE: readonly (readonly [RuleKind, readonly Property[]])[] = [
  ["equal-noise", []],
  ["plain-sum", ["unit-invariant", "speed-neutral"]],
  ["plain-product", ["unit-invariant", "speed-neutral"]],
  ["conductance-less-level", ["speed-neutral"]],
  ["speed-neutral", []],
];

// Some thousand curves a rule: more time than a test has by default on a busy machine.
describe("properties of scoring rules, tried", { timeout: 60_000 }, () => {
  it.each(TABLE)("%s: a counter-example is found for %j and for nothing else in 40 draws", (kind, broken) => {
    const trials = tryProperties({ kind, levelsDba: [30, 35, 40], m: 0.6 }, 1, 40);
    expect(trials.filter(({ counterExample }) => counterExample).map(({ property }) => property)).toEqual(broken);
  });

  it("gives the same counter-example for the same seed", () => {
    const rule = { kind: "plain-sum", levelsDba: [30, 35, 40] } as const;
    expect(tryProperties(rule, 5, 8)).toEqual(tryProperties(rule, 5, 8));
  });

  it("refuses levels that its fans can't all reach, instead of calling nothing a property", () => {
    expect(() => tryProperties({ kind: "equal-noise", levelsDba: [20, 60] }, 1, 5)).toThrow(RangeError);
  });
});
