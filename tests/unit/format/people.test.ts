import { describe, expect, it } from "vitest";
import { formatBytes } from "@/lib/format/bytes";
import { formatDate, formatDateTime, machineTime } from "@/lib/format/dates";
import { formatDuration } from "@/lib/format/durations";
import { formatDelta, formatLevel, formatLevelRange, formatPercent, formatRange } from "@/lib/format/quantities";
import { formatRank, formatRankRange } from "@/lib/format/ranks";
import { convertUnit } from "@/lib/format/units";
import { countWords, listWords } from "@/lib/format/words";

describe("quantities carry what makes them comparable", () => {
  it("never writes a level without its distance", () => {
    expect(formatLevel(49.62, 100)).toBe("49.6 dB(A) @ 100 mm");
    expect(formatLevel(38.2, 100, { upperBound: true })).toBe("≤ 38.2 dB(A) @ 100 mm");
    expect(formatLevelRange(55.1, 38.2, 100)).toBe("38–55 dB(A) @ 100 mm");
  });

  it("shows the sign of a difference with a true minus", () => {
    expect(formatDelta(-2.41, { unit: "K" })).toBe("\u22122.4 K");
    expect(formatDelta(0.31, { unit: "dB" })).toBe("+0.3 dB");
    expect(formatDelta(-0.01)).toBe("0.0");
    expect(formatRange(-2, 3)).toBe("\u22122 to 3");
    expect(formatPercent(0.963)).toBe("96.3 %");
  });

  it("converts exactly at fixed points (NIST SP 811 (2008), B.8: 32 °F is 0 °C, 1 in is 25.4 mm)", () => {
    expect(convertUnit(32, "°F", "°C")).toBeCloseTo(0, 12);
    expect(convertUnit(100, "°C", "°F")).toBeCloseTo(212, 12);
    expect(convertUnit(2, "in", "mm")).toBe(50.8);
    expect(() => convertUnit(1, "K", "°C")).toThrow(RangeError);
  });
});

describe("ranks, dates, sizes", () => {
  it("names ranks, also the teens", () => {
    expect([1, 2, 3, 4, 11, 12, 13, 21, 112].map(formatRank).join(" ")).toBe(
      "1st 2nd 3rd 4th 11th 12th 13th 21st 112th",
    );
    expect(formatRankRange(2, 5, 14)).toBe("2nd to 5th of 14");
    expect(formatRankRange(1, 1, 14)).toBe("1st of 14");
    expect(() => formatRank(0)).toThrow(RangeError);
  });

  it("writes a moment in the zone asked for", () => {
    expect(formatDate("2026-03-14T23:30:00Z")).toBe("14 Mar 2026");
    expect(formatDate("2026-03-14T23:30:00Z", "Europe/Berlin")).toBe("15 Mar 2026");
    expect(formatDateTime("2026-09-01T00:05:00Z")).toBe("1 Sep 2026, 00:05 UTC");
    expect(machineTime("2026-09-01T02:05:00+02:00")).toBe("2026-09-01T00:05:00.000Z");
    expect(() => formatDate("soon")).toThrow(RangeError);
  });

  it("writes durations in two units at most", () => {
    expect([0, 45, 60, 754, 3599.6, 7500, 200000].map(formatDuration)).toEqual([
      "0 s",
      "45 s",
      "1 min",
      "12 min 34 s",
      "1 h",
      "2 h 5 min",
      "2 d 8 h",
    ]);
  });

  it("writes sizes with decimal prefixes", () => {
    expect([0, 612, 1000, 1300000, 999600, 12_345_678_901].map(formatBytes)).toEqual([
      "0 B",
      "612 B",
      "1.0 kB",
      "1.3 MB",
      "1.0 MB",
      "12.3 GB",
    ]);
  });

  it("lists and counts in words", () => {
    expect(listWords(["7", "9", "11"], "or")).toBe("7, 9 or 11");
    expect(listWords([])).toBe("");
    expect(countWords(1, "design")).toBe("1 design");
    expect(countWords(1318, "entry", "entries")).toBe("1\u202f318 entries");
  });
});
