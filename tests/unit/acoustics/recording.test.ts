import { describe, expect, it } from "vitest";
import { analyseRecording, type SoundOptions } from "@/lib/science/acoustics/analyse-recording";
import type { ByteSource } from "@/lib/science/acoustics/recording";
import type { SoundReport } from "@/lib/science/acoustics/sound-report";
import { Refusal } from "@/lib/science/refusal";
import { addTone, noise, wavBytes, type WavSpec } from "./wav-bytes";

const RATE = 48000;
/** rms 1 re full scale is 100 dB, so that levels below follow by definition: 100 + 20 lg rms. */
const FULL_SCALE: SoundOptions = { calibration: { fullScaleDb: 100 } };

const silence = (seconds: number) => new Float64Array(Math.round(seconds * RATE));
const wav = (samples: Float64Array, spec: WavSpec = {}) =>
  wavBytes({ encoding: "float", bits: 64, channels: [samples], ...spec });
const read = async (source: ByteSource, options: Partial<SoundOptions> = {}): Promise<SoundReport> =>
  (await analyseRecording(source, { ...FULL_SCALE, ...options })).report;
const codes = (report: SoundReport) => report.warnings.map(({ code }) => code);
const refusal = async (source: ByteSource, options: Partial<SoundOptions> = {}) =>
  read(source, options).then(
    () => "read",
    (error: unknown) => (error instanceof Refusal ? error.code : "other"),
  );

describe(
  "a recording with known content (levels by definition of the sound pressure level)",
  { timeout: 60_000 },
  () => {
    it("reads a 1 kHz tone at 60 dB as 60 dB in Z, C, A and its band", async () => {
      const report = await read(wav(addTone(silence(12), 1000, 0.01)));
      const band = report.bands.find(({ nominalHz }) => nominalHz === 1000);
      for (const level of [report.levelZDb, report.levelCDb, report.levelADba, band?.levelDb]) {
        expect(level).toBeCloseTo(60, 2);
      }
      expect(report.durationS).toBe(12);
      expect(report.usedS).toBe(12);
      expect(report.warnings).toEqual([]);
    });

    it("reads white noise in Z over 10 Hz to 20 kHz: the share of its power in that range", async () => {
      const report = await read(wav(noise(5, 20 * RATE, 0.01)));
      expect(report.levelZDb).toBeCloseTo(60 + 10 * Math.log10(19990 / 24000), 1);
    });

    it("takes the level off a calibrator recording, and noise beside its tone doesn't bias it", async () => {
      const calibrator = addTone(noise(6, 5 * RATE, 0.005), 1000, 0.05);
      const options = { calibration: { recording: wav(calibrator), levelDb: 94 } };
      const report = await read(wav(addTone(silence(10), 500, 0.05)), options);
      expect(report.levelZDb).toBeCloseTo(94, 1);
      const late = addTone(silence(6), 1000, 0.05).fill(0, 0, RATE);
      const cut = await read(wav(addTone(silence(10), 500, 0.05)), {
        calibration: { recording: wav(late), levelDb: 94 },
      });
      expect(cut.levelZDb).toBeCloseTo(94, 1);
    });

    it("leaves out seconds more than 3 dB above the median, lists them and keeps those 2.5 dB above", async () => {
      const samples = noise(7, 20 * RATE, 0.01);
      for (let i = 8 * RATE; i < 10 * RATE; i += 1) samples[i] = 5 * (samples[i] ?? 0);
      for (let i = 15 * RATE; i < 16 * RATE; i += 1) samples[i] = 10 ** (2.5 / 20) * (samples[i] ?? 0);
      const report = await read(wav(samples));
      expect(report.disturbed).toEqual([{ fromS: 8, toS: 10 }]);
      expect(report.usedS).toBe(18);
      const power = (17 + 10 ** 0.25) / 18;
      expect(report.levelZDb).toBeCloseTo(60 + 10 * Math.log10((power * 19990) / 24000), 1);
    });

    it("warns under 10 s and refuses under 1 s", async () => {
      expect(codes(await read(wav(noise(8, 10 * RATE, 0.01))))).toEqual([]);
      expect(codes(await read(wav(noise(8, 10 * RATE - 1, 0.01))))).toEqual(["short"]);
      expect(codes(await read(wav(noise(8, RATE, 0.01))))).toEqual(["short"]);
      expect(await refusal(wav(noise(8, RATE - 1, 0.01)))).toBe("too-short");
    });

    it("refuses clipping: three samples near full scale in a row, or an integer limit twice", async () => {
      const loud = addTone(silence(2), 1000, 0.9).map((value) => Math.max(-1, Math.min(1, value)));
      for (const bits of [8, 16, 24, 32]) expect(await refusal(wav(loud, { encoding: "int", bits }))).toBe("clipped");
      expect(await refusal(wav(loud))).toBe("clipped");
      const single = noise(9, 2 * RATE, 0.01);
      single[RATE] = 1;
      expect(await refusal(wav(single, { encoding: "int", bits: 16 }))).toBe("read");
    });

    it("refuses samples that are no numbers and says which", async () => {
      const samples = noise(10, 2 * RATE, 0.01);
      samples[99] = NaN;
      await expect(read(wav(samples))).rejects.toMatchObject({ code: "wav-not-finite", at: "sample 100" });
    });

    it("gives null and a warning for digital silence, also with an offset", async () => {
      for (const value of [0, 0.1]) {
        const report = await read(wav(silence(12).fill(value)), { background: wav(noise(11, 12 * RATE, 0.001)) });
        expect(report).toMatchObject({ levelZDb: null, levelCDb: null, levelADba: null, loudness: null, tones: [] });
        expect(report).toMatchObject({ background: null, bandsCorrected: null, correctedDba: null });
        expect(report.bands).toHaveLength(29);
        expect(report.bands.every(({ levelDb }) => levelDb === null)).toBe(true);
        expect(codes(report)).toEqual(["digital-silence"]);
      }
    });

    it("takes the background out of total and bands, with the bounds of the grade", async () => {
      const background = wav(noise(12, 15 * RATE, 0.01));
      const over = (marginDb: number) => wav(noise(13, 15 * RATE, 0.01 * 10 ** (marginDb / 20)));
      const clear = await read(over(8), { background });
      expect(clear.background?.marginDb).toBeCloseTo(8, 1);
      // 0.749 dB at a margin of 8 dB: ISO 3744:2010 8.2.3 Eq. (16).
      expect(clear.background?.correctionDb).toBeCloseTo(0.749, 1);
      expect(clear.correctedDba).toBeCloseTo((clear.levelADba ?? NaN) - (clear.background?.correctionDb ?? NaN), 8);
      const near = await read(over(5), { background });
      expect(near.background).toMatchObject({ upperBound: true });
      expect(near.background?.correctionDb).toBeCloseTo(1.256, 3);
      expect(codes(near)).toContain("background-near");
      const survey = await read(over(5), { background, grade: "survey" });
      expect(survey.background?.upperBound).toBe(false);
      expect(near.bandsCorrected?.filter(({ upperBound }) => upperBound === true).length).toBeGreaterThan(20);
    });

    it("reads one channel of several and says which where nobody chose", async () => {
      const channels = [addTone(silence(10), 1000, 0.01), addTone(silence(10), 1000, 0.1)];
      const bytes = wav(silence(0), { channels });
      expect((await read(bytes, { channel: 2 })).levelADba).toBeCloseTo(80, 2);
      const first = await read(bytes);
      expect(first.levelADba).toBeCloseTo(60, 2);
      expect(codes(first)).toEqual(["channel-assumed"]);
    });

    it("gives the same whether bytes come whole, in pieces or asynchronously", async () => {
      const bytes = wav(addTone(noise(14, 11 * RATE, 0.01), 331, 0.02));
      const whole = await read(bytes);
      const pieces = function* () {
        for (let at = 0; at < bytes.length; at += 77777) yield bytes.subarray(at, at + 77777);
      };
      const slow = async function* () {
        for (const piece of pieces()) yield await Promise.resolve(piece);
      };
      expect(await read(pieces)).toEqual(whole);
      expect(await read(slow)).toEqual(whole);
      expect(await read(bytes.slice().buffer)).toEqual(whole);
    });

    it("leaves bands beyond half the sample rate null, and loudness with them", async () => {
      const report = await read(wav(noise(15, 12 * 16000, 0.01), { sampleRateHz: 16000 }));
      expect(report.bands.at(-1)).toMatchObject({ nominalHz: 16000, levelDb: null });
      expect(report.bands.find(({ nominalHz }) => nominalHz === 6300)?.levelDb).not.toBeNull();
      expect(report.loudness).toBeNull();
      expect(codes(report)).toEqual(["rate-low"]);
    });
  },
);
