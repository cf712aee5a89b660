import { describe, expect, it } from "vitest";
import { analyseRecording, type SoundOptions } from "@/lib/science/acoustics/analyse-recording";
import { predictTones } from "@/lib/science/acoustics/fan-tones";
import { matchTone } from "@/lib/science/acoustics/match-tones";
import type { ReportedTone, SoundReport } from "@/lib/science/acoustics/sound-report";
import { addTone, noise, wavBytes } from "./wav-bytes";

/** Enough for the tones; noise is white up to half of it. */
const RATE = 24000;
const ROTORS = { blades: [11, 7], rpm: [1806, 1806], rotation: "counter", struts: 4 } as const;
const F1 = (11 * 1806) / 60;
const F2 = (7 * 1806) / 60;
/** Harmonic pairs (m₁, m₂) and rms of a made-up contra-rotating fan. */
const PARTS: readonly (readonly [number, number, number])[] = [
  [1, 0, 0.01],
  [2, 0, 0.006],
  [0, 1, 0.008],
  [0, 2, 0.004],
  [1, 1, 0.005],
  [2, 1, 0.003],
];

function fan(speed: number, drift: (timeS: number) => number): Uint8Array {
  const samples = noise(21, 15 * RATE, 0.01);
  for (const [m1, m2, rms] of PARTS) addTone(samples, speed * (m1 * F1 + m2 * F2), rms, RATE, drift);
  return wavBytes({ sampleRateHz: RATE, channels: [samples], bits: 24 });
}

async function read(bytes: Uint8Array, rotors?: SoundOptions["rotors"]): Promise<SoundReport> {
  const options: SoundOptions = { calibration: { fullScaleDb: 100 }, ...(rotors === undefined ? {} : { rotors }) };
  return (await analyseRecording(bytes, options)).report;
}

const near = (report: SoundReport, hz: number): ReportedTone | undefined =>
  report.tones.find(({ frequencyHz }) => Math.abs(frequencyHz - hz) <= Math.max(1, 0.001 * hz));

describe("tones of a fan with known parts (levels by definition, frequencies m·B·n)", { timeout: 60_000 }, () => {
  it.each([
    ["steady", 1, () => 1],
    ["drifting ±0.3 % to and fro", 1, (t: number) => 1 + 0.003 * Math.sin((2 * Math.PI * t) / 5)],
    ["drifting from −0.3 to +0.3 %", 1, (t: number) => 0.997 + (0.006 * t) / 15],
    ["1 % slower than the tachometer says", 0.99, () => 1],
  ] as const)("finds every part, its level and what it is: %s", async (_title, speed, drift) => {
    const report = await read(fan(speed, drift), ROTORS);
    report.speedsRpm?.forEach((rpm) => expect(Math.abs(rpm / (1806 * speed) - 1)).toBeLessThan(0.0005));
    expect(report.speedsRpm).toHaveLength(2);
    for (const [m1, m2, rms] of PARTS) {
      const tone = near(report, speed * (m1 * F1 + m2 * F2));
      expect(Math.abs((tone?.levelDb ?? NaN) - (100 + 20 * Math.log10(rms))), `${m1},${m2}`).toBeLessThan(0.5);
      expect(tone?.match).toMatchObject({ m1, m2, kind: m1 * m2 === 0 ? "blade-passing" : "interaction" });
      expect(Math.abs(tone?.match?.residualHz ?? NaN)).toBeLessThan(1);
      expect(tone?.prominent).toBe(true);
    }
    expect(report.tones).toHaveLength(PARTS.length);
    expect(near(report, speed * F1)?.match).toMatchObject({ rotor: 1, strutModes: [-1, 3] });
    expect(report.warnings.map(({ code }) => code)).toEqual(
      speed === 1 ? ["rate-low"] : ["rate-low", "tachometer-differs", "tachometer-differs"],
    );
  });

  it("tells two tones five lines apart by level and frequency: they share the valley between them", async () => {
    const spacing = RATE / 16384;
    const [low, high] = [174.2, 174.2 + 5 * spacing];
    const samples = addTone(addTone(noise(24, 15 * RATE, 0.003), low, 0.01, RATE), high, 0.008, RATE);
    const { tones } = await read(wavBytes({ sampleRateHz: RATE, channels: [samples], bits: 24 }));
    for (const [hz, rms] of [
      [low, 0.01],
      [high, 0.008],
    ] as const) {
      const tone = tones.find(({ frequencyHz }) => Math.abs(frequencyHz - hz) < 0.1);
      expect(Math.abs((tone?.levelDb ?? NaN) - (100 + 20 * Math.log10(rms))), `${hz} Hz`).toBeLessThan(0.5);
    }
  });

  it("carries the speed over, and says so, where a rotor has no family of its own", async () => {
    const samples = addTone(addTone(noise(22, 12 * RATE, 0.01), F1 * 1.004, 0.01, RATE), 2 * F1 * 1.004, 0.01, RATE);
    const report = await read(wavBytes({ sampleRateHz: RATE, channels: [samples], bits: 24 }), {
      ...ROTORS,
      rpm: [1806, 1700],
    });
    expect(report.speedsRpm?.[0]).toBeCloseTo(1806 * 1.004, 0);
    expect(report.speedsRpm?.[1]).toBeCloseTo(1700 * 1.004, 0);
    expect(report.warnings.map(({ code }) => code)).toEqual(["rate-low", "speed-carried-over"]);
  });

  it("knows no speed where nothing but noise is heard", async () => {
    const report = await read(
      wavBytes({ sampleRateHz: RATE, channels: [noise(23, 12 * RATE, 0.01)], bits: 24 }),
      ROTORS,
    );
    expect(report).toMatchObject({ tones: [], speedsRpm: null });
    expect(report.warnings.map(({ code }) => code)).toEqual(["rate-low", "speed-not-found"]);
  });

  it("doesn't judge a tone below 89.1 Hz, but gives its ratios (ECMA-418-1:2024 clause 8)", async () => {
    for (const hz of [45, 66.7, 80]) {
      const tones = (
        await read(
          wavBytes({ sampleRateHz: RATE, channels: [addTone(noise(24, 12 * RATE, 0.003), hz, 0.01, RATE)], bits: 24 }),
        )
      ).tones;
      expect(tones).toHaveLength(1);
      expect(tones[0]).toMatchObject({ prominent: null, match: null });
      expect(Math.abs((tones[0]?.frequencyHz ?? NaN) - hz)).toBeLessThan(0.3);
      expect(tones[0]?.toneToNoiseDb).toBeGreaterThan(20);
      expect(tones[0]?.prominenceDb).toBeGreaterThan(5);
    }
  });

  it("finds nothing but the tone itself where a file holds one to the last digit of a double", async () => {
    // What else the sum of lines shows lies 240 dB lower: rounding, by the definition of a double (2^-53, 319 dB).
    for (const hz of [1003.3, 4000, 9000.5]) {
      const pure = addTone(new Float64Array(11 * RATE), hz, 0.2, RATE);
      const { tones } = await read(wavBytes({ sampleRateHz: RATE, channels: [pure], encoding: "float", bits: 64 }));
      expect(tones).toHaveLength(1);
      expect(tones[0]?.levelDb).toBeCloseTo(100 + 20 * Math.log10(0.2), 2);
    }
  });

  it("lists no tone below 40 Hz and at most 40", async () => {
    const low = addTone(noise(25, 12 * RATE, 0.003), 35, 0.01, RATE);
    expect((await read(wavBytes({ sampleRateHz: RATE, channels: [low], bits: 24 }))).tones).toEqual([]);
    const many = noise(26, 12 * RATE, 0.001);
    for (let k = 1; k <= 60; k += 1) addTone(many, 150 * k, 0.003, RATE);
    const { tones } = await read(wavBytes({ sampleRateHz: RATE, channels: [many], bits: 24 }));
    expect(tones).toHaveLength(40);
    expect(tones.map(({ frequencyHz }) => frequencyHz)).toEqual(tones.map((t) => t.frequencyHz).sort((a, b) => a - b));
  });
});

describe("matching", () => {
  const predicted = predictTones(ROTORS);

  it("puts blade passing first, then the smallest order, and keeps the rest", () => {
    // 7·F1 = 11·F2 = 2317.7 Hz is harmonic 7 of rotor 1; (m₁, m₂) with 11·m₁ + 7·m₂ = 77 needs m₂ = 11: out of range.
    const seventh = matchTone(7 * F1, predicted, 1.46);
    expect(seventh[0]).toMatchObject({ kind: "blade-passing", rotor: 1, m1: 7, m2: 0 });
    // 11·m₁ + 7·m₂ = 14: harmonic 2 of rotor 2 alone; 11·3 − 7·… = 5 and so on lie 30.1 Hz apart.
    expect(matchTone(2 * F2, predicted, 1.46)).toMatchObject([{ rotor: 2, m1: 0, m2: 2 }]);
    const same = predictTones({ blades: [7, 7], rpm: [1800, 1800] });
    const matches = matchTone(420, same, 1.46);
    expect(matches[0]).toMatchObject({ kind: "blade-passing", rotor: 1, m1: 2 });
    expect(matches[1]).toMatchObject({ kind: "blade-passing", rotor: 2, m2: 2 });
    expect(matches[2]).toMatchObject({ kind: "interaction", m1: 1, m2: 1 });
    expect(matches.length).toBeGreaterThan(3);
  });

  it("reaches one line or half a per cent, whichever is more", () => {
    expect(matchTone(F1 + 1.6, predicted, 1)).toHaveLength(1);
    expect(matchTone(F1 + 1.7, predicted, 1)).toHaveLength(0);
    expect(matchTone(F1 + 1.9, predicted, 2)).toHaveLength(1);
  });

  it("predicts harmonics up to 8 and orders up to 6", () => {
    const blade = predicted.filter(({ kind }) => kind === "blade-passing");
    expect(blade).toHaveLength(16);
    const orders = predicted
      .filter(({ kind }) => kind === "interaction")
      .map(({ m1, m2 }) => Math.abs(m1) + Math.abs(m2));
    expect(Math.max(...orders)).toBe(6);
    // Pairs with m₁ > 0, m₂ ≠ 0 and |m₁| + |m₂| ≤ 6: 2·(5 + 4 + 3 + 2 + 1).
    expect(orders).toHaveLength(30);
    expect(predicted.every(({ m1, m2 }) => m1 * F1 + m2 * F2 > 0)).toBe(true);
  });
});
