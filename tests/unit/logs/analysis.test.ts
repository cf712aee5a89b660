import { describe, expect, it } from "vitest";
import { createRandom } from "@/lib/science/statistics/random";
import { report } from "./reading";

/** A log of an approach to 41 K over an ambient near 22 °C with white noise; s, °C, dB(A). */
function made(lengthS: number, stepS = 5): string {
  const random = createRandom(4);
  let text = "time_s,sensor_c,ambient_c,LAeq dB(A)\n";
  for (let t = 0; t <= lengthS; t += stepS) {
    const ambient = 22 + 0.00002 * t;
    const sensor = ambient + 41 - 30 * Math.exp(-t / 240) + 0.05 * random.normal();
    text += `${t},${sensor.toFixed(4)},${ambient.toFixed(4)},${t % 10 === 0 ? 40 : 30}\n`;
  }
  return text;
}

describe("a log's report", () => {
  it("gives rise, u, ambient, drift and fit over the steady window", () => {
    const { temperature, intervalS, rows } = report(made(3600));
    expect([intervalS, rows]).toEqual([5, 721]);
    expect(temperature?.steady).toMatchObject({ found: true, toS: 3600, how: "slope, variance ratio, fit" });
    expect(Math.abs((temperature?.deltaTK ?? NaN) - 41)).toBeLessThan(3 * (temperature?.uDeltaTK ?? 0));
    expect(temperature?.uDeltaTK).toBeLessThan(0.05);
    const spanS = 3600 - (temperature?.steady.fromS ?? NaN);
    expect(temperature?.ambientDriftK).toBeCloseTo(0.00002 * spanS, 5);
    expect(temperature?.fit?.tauS).toBeCloseTo(240, -1);
  });
  it("gives the energy mean of levels: as many rows of 40 as of 30 dB are 37.4 dB (10 lg 5500)", () => {
    const { level } = report(made(3595));
    expect(level?.laeqDba).toBeCloseTo(10 * Math.log10(5500), 9);
    expect(level?.n).toBe(720);
  });
  it("gives no rise while it still moves, and says why", () => {
    const { temperature, warnings } = report(made(400));
    expect(temperature?.steady).toMatchObject({ found: false, fromS: null, toS: null });
    expect(temperature?.steady.how).toContain("slope");
    expect(temperature?.deltaTK).toBeNull();
    expect(warnings.map(({ code }) => code)).toContain("not-steady");
  });
  it("gives nulls where a thing can't be known: no ambient, no time, no level", () => {
    const lone = report("time_s,sensor_c\n0,50\n1,50\n2,50\n");
    expect([lone.temperature, lone.level]).toEqual([null, null]);
    expect(lone.warnings.map(({ code }) => code)).toContain("no-ambient");
    const timeless = report("sensor_c,ambient_c\n50,20\n50.1,20\n49.9,20\n");
    expect(timeless.intervalS).toBeNull();
    expect(timeless.temperature).toMatchObject({ steady: { found: false }, deltaTK: null, ambientC: 20 });
  });
  it("gives no dB(A) from another weighting, and says when it takes one for it", () => {
    expect(report("time_s,level dB(C)\n0,50\n1,51\n").level?.laeqDba).toBeNull();
    expect(report("time_s,level dB\n0,50\n1,50\n").warnings.map(({ code }) => code)).toContain("weighting-assumed");
  });
  it("names gaps in time", () => {
    const text = `time_s,LAeq\n${[0, 1, 2, 3, 60, 61].map((t) => `${t},40\n`).join("")}`;
    expect(report(text).warnings).toContainEqual({ code: "gaps", message: "1 gaps in time, the longest 57 s" });
  });
});
