import { describe, expect, it } from "vitest";
import { formatMeasured, writeMeasured } from "@/lib/format/measured";
import { formatNumber, roundTo } from "@/lib/format/numbers";

describe("value and uncertainty are rounded together (JCGM 100:2008, 7.2.6)", () => {
  it("writes the guide's own example: y = 10.057 62 Ω with u = 27 mΩ is 10.058 Ω", () => {
    expect(formatMeasured({ value: 10.05762, uncertainty: 0.027 })).toEqual({ value: "10.058", uncertainty: "0.027" });
  });

  it("writes the mass of 7.2.2 and 7.2.4: (100.021 47 ± 0.000 79) g", () => {
    expect(formatMeasured({ value: 100.02147, uncertainty: 0.00079 })).toEqual({
      value: "100.02147",
      uncertainty: "0.00079",
    });
  });

  it("takes 28.05 kHz down to 28 kHz, as 7.2.6 does", () => {
    expect(formatMeasured({ value: 1000, uncertainty: 28.05 }).uncertainty).toBe("28");
  });

  it.each([
    // Hand-derived from the rule.
    [{ value: 57.6432, uncertainty: 9.96 }, "58", "10"],
    [{ value: 1453, uncertainty: 123 }, "1\u202f450", "120"],
    [{ value: -2.41, uncertainty: 0.84, decimals: 1, signed: true }, "\u22122.4", "0.8"],
    [{ value: 0.04, uncertainty: 0.3, decimals: 1, signed: true }, "0.0", "0.3"],
    [{ value: 0.7, uncertainty: 0.02, decimals: 1 }, "0.70", "0.02"],
    [{ value: 5, uncertainty: 0, decimals: 1 }, "5.0", "0.0"],
    [{ value: 57.64 }, "57.6", undefined],
  ])("%j", (measured, value, uncertainty) => {
    expect(formatMeasured(measured)).toEqual({ value, uncertainty });
  });

  it("refuses an uncertainty that can't be", () => {
    expect(() => formatMeasured({ value: 1, uncertainty: -0.1 })).toThrow(RangeError);
    expect(() => formatMeasured({ value: Number.NaN, uncertainty: 0.1 })).toThrow(RangeError);
  });

  it("joins them for a caption", () => {
    expect(writeMeasured({ value: -2.44, uncertainty: 0.8, decimals: 1, signed: true }, "K")).toBe("\u22122.4 ±0.8 K");
  });
});

describe("numbers", () => {
  it("rounds halves away from zero as they are written", () => {
    expect(roundTo(2.675, 2)).toBe(2.68);
    expect(roundTo(1.005, 2)).toBe(1.01);
    expect(roundTo(-0.05, 1)).toBe(-0.1);
    expect(roundTo(1450, -2)).toBe(1500);
    expect(roundTo(1e-9, 3)).toBe(0);
  });

  it("never writes a minus zero, and groups from a thousand up", () => {
    expect(formatNumber(-0.04, { decimals: 1, signed: true })).toBe("0.0");
    expect(formatNumber(-1234567.5, { decimals: 1 })).toBe("\u22121\u202f234\u202f567.5");
    expect(() => formatNumber(Number.POSITIVE_INFINITY)).toThrow(RangeError);
  });
});
