import { expect, test } from "vitest";
import { cellNumber, groupLook } from "@/lib/science/logs/cells";
import { timestampSeconds } from "@/lib/science/logs/times";
import { bytesOf, list, readBytes, readText, report } from "./reading";

/** Names "time (s), heatsink (°C), room air (°C)" and a line end, as the codecs of Python 3.11 write them. */
const NAMES = {
  shift_jis: "8e9e8ad4289562292c8371815b836783568393834e89b7937828818e292c8eba89b728818e290a",
  gbk: "cab1bce428c3eb292cc9a2c8c8c6f7cec2b6c828a1e6292cbbb7beb3cec2b6c828a1e6290a",
  "windows-1251": "c2f0e5ecff2028f1292cc4e0f2f7e8ea2028b0d1292cceeaf0f3e6e0fef9e8e920e2eee7e4f3f52028b0d1290a",
  "euc-kr": "bdc3b0a328c3ca292cbcbebcad20bfc2b5b528a1c9292cc1d6baaf20bfc2b5b528a1c9290a",
};

test.each(Object.entries(NAMES))("names in %s are read for what they say", (_, hex) => {
  const names = Uint8Array.from(hex.match(/../g) ?? [], (pair) => parseInt(pair, 16));
  const rows = bytesOf("0,40.5,22.5\n5,40.6,22.4\n10,40.7,22.5\n");
  const log = readBytes(Uint8Array.from([...names, ...rows]));
  expect(log.columns.map(({ quantity, unit, role }) => [quantity, unit?.symbol, role])).toEqual([
    ["time", "s", undefined],
    ["temperature", "°C", "sensor"],
    ["temperature", "°C", "ambient"],
  ]);
  expect(list(log.sensorC)).toEqual([40.5, 40.6, 40.7]);
});

// Groups of three after a mark: ISO 80000-1:2009, 7.3.1 (blank); other marks are common practice, no source.
test.each([
  ["1'234.5", ".", 1234.5],
  ["12.345,25", ",", 12345.25],
  ["1,234.5", ".", 1234.5],
  ["1.234.567", ",", 1234567],
  ["1\u202f234,5", ",", 1234.5],
  ["-1 234", ".", -1234],
] as const)("%s is one number", (text, decimal, value) => {
  expect(groupLook(text)?.sure).toBe(true);
  expect(cellNumber(text, { decimal, grouped: true })).toBe(value);
});

test("a cell that begins with 0 is no group of thousands", () => {
  expect(groupLook("0.500")).toBeUndefined();
  expect(cellNumber("0.500", { decimal: ",", grouped: true })).toBeNaN();
});

const HUNDREDS = Array.from({ length: 30 }, (_, i) => 100 * i);

test("times in thousands are one column that rises, not one that starts again at each thousand", () => {
  const rows = HUNDREDS.map((s) => `${s.toLocaleString("de-DE", { useGrouping: true })};40,5;22,5`);
  const log = readText(["Zeit (s);Fühler (°C);Raum (°C)", ...rows, ""].join("\n"));
  expect(log.refusedCount).toBe(0);
  expect(list(log.timeS)).toEqual(HUNDREDS);
});

test("times with three decimals stay what they are", () => {
  const rows = HUNDREDS.map((s) => `${(s / 100).toFixed(3)};40.5;22.5`);
  expect(list(readText(["time (s);sink (°C);room (°C)", ...rows, ""].join("\n")).timeS)).toEqual(
    HUNDREDS.map((s) => s / 100),
  );
});

test("maxima and peaks are levels, never temperatures; a C or Z level gives no dB(A)", () => {
  const read = report("time,LAeq,LAmax,LCpeak\n0,40,44,60\n1,40,44,60\n2,40,44,60\n");
  expect(read.columns.map(({ quantity }) => quantity)).toEqual(["time", "level", "level", "level"]);
  expect(read.temperature).toBeNull();
  for (const name of ["LZeq (dB)", "LCF (dB)", "LZ (dB)"])
    expect(report(`time,${name}\n0,40\n1,41\n2,40\n`).level?.laeqDba).toBeNull();
});

test("a repeated name keeps its unit", () => {
  const log = readText("time_s,temp (°F),temp (°F)\n0,104,68\n1,104,68\n2,104,68\n");
  expect(log.columns.map(({ name, unit }) => [name, unit?.symbol])).toEqual([
    ["time_s", "s"],
    ["temp (°F)", "°F"],
    ["temp (°F) (2)", "°F"],
  ]);
  // 104 °F is 40 °C, 68 °F is 20 °C by definition.
  expect(list(log.ambientC)?.[0]).toBeCloseTo(20, 12);
});

test("a count of seconds since 1970 is the time whatever it is called", () => {
  const log = readText("ts,sensor,ambient\n1772400000.25,40,22\n1772400005.25,40,22\n1772400010.25,40,22\n");
  expect(list(log.timeS)).toEqual([0, 5, 10]);
});

// 2026-03-28 23:40:00 UTC is 1774741200 s after 1970-01-01 (date -u -d, GNU coreutils).
test.each([
  "28 Mar 2026 23:40:00",
  "28-Mar-26 23:40:00",
  "28. März 2026 23:40:00",
  "28 mars 2026 23:40:00",
  "Mar 28, 2026 23:40:00",
  "2026年3月28日 23時40分00秒",
  "2026年03月28日 23:40:00",
])("%s is a date", (text) => {
  expect(timestampSeconds(text, "day-first")).toBe(1774741200);
});

test("a word that is no month is no date", () => {
  expect(timestampSeconds("28 Fan 2026 23:40:00", "day-first")).toBeNaN();
});
