import { describe, expect, it } from "vitest";
import { bytesOf, list, readBytes, readText } from "./reading";

const expected = { timeS: [0, 5, 10], sensorC: [52.5, 52.25, 52.125], ambientC: [21.5, 21.25, 21] };
const rows = (marks: (value: number) => string, divide: string, end: string) =>
  expected.timeS
    .map((t, i) => [t, expected.sensorC[i] ?? 0, expected.ambientC[i] ?? 0].map(marks).join(divide) + end)
    .join("");
const point = (value: number) => String(value);
const comma = (value: number) => String(value).replace(".", ",");

const logs: Record<string, string> = {
  "commas and points, LF": `time_s,sensor_c,ambient_c\n${rows(point, ",", "\n")}`,
  "semicolons and decimal commas, CRLF": `Zeit (s);Kühler (°C);Umgebung (°C)\r\n${rows(comma, ";", "\r\n")}`,
  "tabs and decimal commas, CR alone": `Temps (s)\tRadiateur (°C)\tAmbiante (°C)\r${rows(comma, "\t", "\r")}`,
  "quoted decimal commas between commas": `"t [s]","sensor [°C]","ambient [°C]"\n${rows((v) => `"${comma(v)}"`, ",", "\n")}`,
  Fahrenheit: `time_s,sensor_degF,ambient_degF\n0,126.5,70.7\n5,126.05,70.25\n10,125.825,69.8\n`,
  kelvin: `time_s,T sensor [K],T ambient [K]\n0,325.65,294.65\n5,325.4,294.4\n10,325.275,294.15\n`,
  milliseconds: `elapsedMs,sensorC,ambientC\n1000,52.5,21.5\n6000,52.25,21.25\n11000,52.125,21\n`,
  "clock times over midnight": `clock;sensor (°C);ambient (°C)\n23:59:55;52,5;21,5\n00:00:00;52,25;21,25\n00:00:05;52,125;21\n`,
  "half-day clock times": `time,sensor °C,ambient °C\n11:59:55 AM,52.5,21.5\n12:00:00 PM,52.25,21.25\n12:00:05 PM,52.125,21\n`,
  "timestamps with zones": `timestamp,sensor_c,ambient_c\n2026-03-01T00:59:55+01:00,52.5,21.5\n2026-03-01T00:00:00Z,52.25,21.25\n2026-03-01T00:00:05.000Z,52.125,21\n`,
  "dates with points": `Datum/Uhrzeit;Fühler °C;Raum °C\n31.12.2025 23:59:55;52,5;21,5\n01.01.2026 00:00:00;52,25;21,25\n01.01.2026 00:00:05;52,125;21\n`,
  "a date and a time column": `Date,Time,sensor_c,ambient_c\n2026-03-01,10:00:00,52.5,21.5\n2026-03-01,10:00:05,52.25,21.25\n2026-03-01,10:00:10,52.125,21\n`,
  "a row of units": `time;sensor;ambient\ns;°C;°C\n${rows(comma, ";", "\n")}`,
  "remarks, a preamble and blank lines": `# bench 2\nDevice: logger\n\nStart;2026-03-01\ntime_s;sensor_c;ambient_c\n# heat on\n${rows(point, ";", "\n\n")}# end\n;;\n`,
  "names in other scripts": `時間(秒),センサ温度(℃),周囲温度(℃)\n${rows(point, ",", "\n")}`,
  "units in the cells": `time,sensor,ambient\n${rows((v) => (expected.timeS.includes(v) ? `${v} s` : `${v} °C`), ",", "\n")}`,
  "blanks alone, in columns of one width": `time_s  sensor_c  ambient_c\n${rows((v) => v.toFixed(3).padStart(10), " ", "\n")}`,
  "blanks, names of several words, decimal commas": `Zeit (s)  Kühler vorn (°C)  Raum (°C)\r\n${rows(comma, "   ", " \r\n")}`,
  "blanks, units in brackets": `t [s] Heatsink [°C] Room [°C]\n${rows(point, " ", "\n")}`,
  "blanks, a date and a clock": `date time sensor_c ambient_c\n2026-03-01 10:00:00 52.5 21.5\n2026-03-01 10:00:05 52.25 21.25\n2026-03-01 10:00:10 52.125 21\n`,
  "blanks around cells and a byte mark": `\ufefftime_s , sensor_c , ambient_c\n${rows((v) => ` ${v} `, ",", "\n")}`,
  "a status column in words": `time_s,state,sensor_c,ambient_c\n0,ok,52.5,21.5\n5,"ok, still",52.25,21.25\n10,,52.125,21\n`,
  "a trailing delimiter in every row": `time_s;sensor_c;ambient_c;\n${rows(comma, ";", ";\n")}`,
  "no line end after the last row": `time_s,sensor_c,ambient_c\n${rows(point, ",", "\n").trimEnd()}`,
  "signs, exponents and typographic minus": `time_s,sensor_c,ambient_c\n0,+52.5,2.15e1\n5,5225e-2,21.25\n10,52.125,21.\n`,
};

describe("a log's layout", () => {
  it.each(Object.entries(logs))("is read: %s", (_, text) => {
    const log = readText(text);
    expect(log.refused).toEqual([]);
    expect(list(log.timeS)).toEqual(expected.timeS);
    expected.sensorC.forEach((value, i) => expect(log.sensorC?.[i]).toBeCloseTo(value, 10));
    expected.ambientC.forEach((value, i) => expect(log.ambientC?.[i]).toBeCloseTo(value, 10));
  });
  it("is read in UTF-16 and with names in Windows-1252", () => {
    const text = logs["semicolons and decimal commas, CRLF"] ?? "";
    const wide = new Uint8Array([
      0xff,
      0xfe,
      ...[...text].flatMap((c) => [c.charCodeAt(0) & 255, c.charCodeAt(0) >> 8]),
    ]);
    expect(list(readBytes(wide, {}, 7).sensorC)).toEqual(expected.sensorC);
    const narrow = Uint8Array.from([...text].map((c) => c.charCodeAt(0)));
    const log = readBytes(narrow);
    expect(log.columns[1]?.name).toBe("Kühler (°C)");
    expect(list(log.sensorC)).toEqual(expected.sensorC);
  });
  it("takes a level of dB(A) before other levels, and single columns of decimal commas", () => {
    const log = readText("time_s,LCpeak dB(C),LAFmax dB(A),LAeq dB(A)\n0,80,45,38.5\n1,81,46,38.25\n");
    expect(log.chosen.level?.name).toBe("LAeq dB(A)");
    expect(list(readText("LAeq\n38,5\n38,25\n").levelDb)).toEqual([38.5, 38.25]);
  });
  it("numbers repeated names and keeps odd ones", () => {
    const log = readText("time_s,temp (°C),temp (°C),__proto__\n0,40,20,1\n1,41,20,1\n");
    expect(log.columns.map(({ name }) => name)).toEqual(["time_s", "temp (°C)", "temp (°C) (2)", "__proto__"]);
    expect(list(log.sensorC)).toEqual([40, 41]);
    expect(log.warnings.map(({ code }) => code)).toContain("columns-assumed");
  });
  it("reads rows without names by what is named for them", () => {
    const log = readText("0;40,5;20\n1;41,5;20\n2;42,5;20,5\n", { sensor: "column 2", ambient: "column 3" });
    expect(list(log.sensorC)).toEqual([40.5, 41.5, 42.5]);
    expect(list(log.timeS)).toEqual([0, 1, 2]);
  });
  it("counts physical lines of a log laid out by blanks, and refuses a row that lacks a cell", () => {
    const log = readText("time_s sensor_c ambient_c\n0 52.5 21.5\n# heat on\n\n  5   21.25\n10 52.125 21\n");
    expect(log.refused).toEqual([{ line: 5, reason: "2 cells where 3 are expected" }]);
    expect(list(log.timeS)).toEqual([0, 10]);
  });
  it("gives the same for every chunking", () => {
    for (const text of Object.values(logs)) {
      const whole = readText(text);
      for (const chunk of [1, 3, 17]) {
        const log = readBytes(bytesOf(text), {}, chunk);
        expect([list(log.timeS), list(log.sensorC), log.refused]).toEqual([
          list(whole.timeS),
          list(whole.sensorC),
          whole.refused,
        ]);
      }
    }
  });
});

describe("what is taken as understood", () => {
  it("reads a count from 0:00 as minutes and seconds, and short names as temperatures", () => {
    const log = readText("Elapsed,Ts,Ta\n0:00,40,20\n0:05,41,20\n0:10,42,20\n");
    expect(list(log.timeS)).toEqual([0, 5, 10]);
    expect([log.chosen.sensor?.name, log.chosen.ambient?.name]).toEqual(["Ts", "Ta"]);
  });
  it("guesses two columns of unknown name, and says so", () => {
    const log = readText("No.,Uhr,Kanal 1,Kanal 2\n1,10:00:00,20.5,50.5\n2,10:00:05,20.5,51\n3,10:00:10,20.5,50\n");
    expect(list(log.sensorC)).toEqual([50.5, 51, 50]);
    expect(log.warnings.map(({ code }) => code)).toEqual(expect.arrayContaining(["columns-assumed", "unit-assumed"]));
  });
});
