import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { parseTypedNumber } from "@/lib/format/typed-number";

// What people type is common practice, no source; conversions are checked against NIST SP 811 (2008), B.8.
describe("parseTypedNumber reads what people write", () => {
  it.each([
    ["54,3", "°C", 54.3],
    ["54.3 °C", "°C", 54.3],
    ["54.3°C", "°C", 54.3],
    ["54,3 c", "°C", 54.3],
    ["−2", "K", -2],
    ["–2,5", "K", -2.5],
    ["- 2", "K", -2],
    ["+0.4", "dB", 0.4],
    ["1 450 rpm", "rpm", 1450],
    ["1\u202f450", "rpm", 1450],
    ["1'450.5", "rpm", 1450.5],
    ["1.450,5", "rpm", 1450.5],
    ["1,450.5", "rpm", 1450.5],
    ["0,450", "", 0.45],
    [".5", "mm", 0.5],
    ["1e3", "rpm", 1000],
    ["38.2 dB(A)", "dB(A)", 38.2],
    ["38.2 dBA", "dB(A)", 38.2],
    ["-0", "K", 0],
  ])("%s in %s is %d", (text, unit, value) => {
    expect(parseTypedNumber(text, unit)).toEqual({ value, unit });
  });

  it("converts a unit that was typed into the field's own", () => {
    // 212 °F = 100 °C and 1 in = 25.4 mm: NIST SP 811 (2008), B.8.
    expect(parseTypedNumber("212 °F", "°C").value).toBeCloseTo(100, 12);
    expect(parseTypedNumber("-40 F", "°C").value).toBeCloseTo(-40, 12);
    expect(parseTypedNumber('1"', "mm")).toEqual({ value: 25.4, unit: "mm" });
    expect(parseTypedNumber("25.4 mm", "in").value).toBeCloseTo(1, 12);
  });
});

describe("parseTypedNumber refuses what it can't be sure of", () => {
  it.each([
    ["", "°C", "Nothing"],
    ["  ", "°C", "Nothing"],
    ["warm", "°C", "not a number"],
    ["1,450", "rpm", "two ways"],
    ["1.450.000", "rpm", "two ways"],
    ["1 45", "rpm", "gap"],
    ["54.3 °C", "K", "wants K"],
    ["54.3 K", "°C", "wants °C"],
    ["38.2 dB", "dB(A)", "wants dB(A)"],
    ["5 parsecs", "mm", "not a unit"],
    ["5 mm", "", "bare number"],
    ["5-6", "mm", "not a unit"],
    ["1e999", "mm", "too large"],
    ["NaN", "mm", "not a number"],
    ["Infinity", "mm", "not a number"],
    ["5e", "mm", "not a unit"],
  ])("%j in %j says why", (text, unit, words) => {
    const answer = parseTypedNumber(text, unit);
    expect(answer.value).toBeUndefined();
    expect(answer.why).toContain(words);
  });

  it("never answers anything but a finite number or a reason", () => {
    fc.assert(
      fc.property(fc.string(), (text) => {
        const answer = parseTypedNumber(text, "°C");
        expect(answer.value === undefined ? answer.why !== "" : Number.isFinite(answer.value)).toBe(true);
      }),
    );
  });

  it("reads back every number with a decimal comma", () => {
    fc.assert(
      fc.property(fc.double({ min: -1e6, max: 1e6, noNaN: true }), (value) => {
        const text = value.toFixed(4).replace(".", ",");
        expect(parseTypedNumber(text, "K").value).toBeCloseTo(Number(value.toFixed(4)), 9);
      }),
    );
  });
});
