import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { analyseRecording } from "@/lib/science/acoustics/analyse-recording";
import { WavReader } from "@/lib/science/acoustics/wav-reader";
import { Refusal } from "@/lib/science/refusal";
import { join, noise, wavBytes, type WavSpec } from "./wav-bytes";

/** All samples of a channel, the file pushed in pieces of a size. */
function readAll(bytes: Uint8Array, channel = 1, piece = bytes.length): { rate: number; samples: number[] } {
  const samples: number[] = [];
  let rate = 0;
  const reader = new WavReader({ channel }, "The file", {
    format: (format) => (rate = format.sampleRateHz),
    samples: (values, count) => samples.push(...values.subarray(0, count)),
  });
  for (let at = 0; at < bytes.length; at += piece) reader.push(bytes.subarray(at, at + piece));
  reader.end();
  return { rate, samples };
}

function codeOf(action: () => unknown): string {
  try {
    action();
  } catch (error) {
    if (error instanceof Refusal) return error.code;
    throw error;
  }
  return "read";
}

const layouts: WavSpec[] = [
  { bits: 8 },
  { bits: 16 },
  { bits: 24 },
  { bits: 32 },
  { encoding: "float", bits: 32 },
  { encoding: "float", bits: 64 },
];
const left = noise(1, 500, 0.1);
const right = noise(2, 500, 0.1);

describe("reading WAV", { timeout: 60_000 }, () => {
  it.each(layouts.flatMap((layout) => [layout, { ...layout, extensible: true }]))(
    "gives each channel back to the step of its samples: %o",
    (layout) => {
      const bytes = wavBytes({ ...layout, channels: [left, right], sampleRateHz: 44100 });
      const step = layout.encoding === "float" ? 1e-7 : 2 ** -(layout.bits ?? 16);
      for (const [channel, source] of [
        [1, left],
        [2, right],
      ] as const) {
        const { rate, samples } = readAll(bytes, channel);
        expect(rate).toBe(44100);
        expect(samples).toHaveLength(500);
        samples.forEach((sample, i) =>
          expect(Math.abs(sample - (source[i] ?? NaN))).toBeLessThanOrEqual(step * 1.0001),
        );
      }
    },
  );

  it("reads the same however the file is cut into pieces", () => {
    const bytes = wavBytes({ bits: 24, channels: [left, right], extra: [{ name: "LIST", body: new Uint8Array(7) }] });
    const whole = readAll(bytes, 2).samples;
    fc.assert(
      fc.property(fc.integer({ min: 1, max: 200 }), (piece) => {
        expect(readAll(bytes, 2, piece).samples).toEqual(whole);
      }),
      { numRuns: 30 },
    );
  });

  it("reads to the end of the file where a streaming writer left the size open", () => {
    const open = [
      wavBytes({ channels: [left], dataSize: 0xffffffff, riffSize: 0xffffffff }),
      wavBytes({ channels: [left], dataSize: 0, riffSize: 0 }),
      // A recorder that was cut off leaves its first header: no samples yet. Common practice, no source.
      wavBytes({ channels: [left], dataSize: 0, riffSize: 36 }),
      wavBytes({ channels: [left], dataSize: 0 }),
    ];
    const whole = readAll(wavBytes({ channels: [left] })).samples;
    for (const bytes of open)
      for (const piece of [1, 5, 11, 4096]) expect(readAll(bytes, 1, piece).samples).toEqual(whole);
  });

  it("takes a chunk behind a data chunk of no bytes for no samples", () => {
    const empty = wavBytes({ riffSize: 4 + 24 + 8 + 8 + 6 });
    const list = Uint8Array.from([...new TextEncoder().encode("LIST"), 6, 0, 0, 0, 1, 2, 3, 4, 5, 6]);
    for (const bytes of [empty, join([empty, list])]) expect(() => readAll(bytes)).toThrowError(/holds no samples/);
  });

  it.each<[string, Uint8Array, string]>([
    ["no bytes", new Uint8Array(0), "empty-file"],
    ["one byte", Uint8Array.of(82), "not-wav"],
    ["another format", join([new TextEncoder().encode("OggS"), new Uint8Array(60)]), "not-wav"],
    ["a header and no more", wavBytes({ channels: [left] }).slice(0, 12), "wav-no-format"],
    ["a format chunk cut short", wavBytes({ channels: [left] }).slice(0, 30), "wav-truncated"],
    ["no data chunk", wavBytes({ channels: [left] }).slice(0, 36), "wav-no-data"],
    ["samples cut short", wavBytes({ channels: [left] }).slice(0, 700), "wav-truncated"],
    ["no samples", wavBytes(), "wav-no-samples"],
    ["zero channels", wavBytes({ channels: [left], header: { channels: 0 } }), "wav-no-channels"],
    ["zero rate", wavBytes({ channels: [left], header: { rate: 0 } }), "wav-no-rate"],
    ["a rate of 4 GHz", wavBytes({ channels: [left], header: { rate: 4294967295 } }), "wav-rate"],
    ["A-law", wavBytes({ channels: [left], header: { tag: 6 } }), "wav-encoding"],
    ["12 bits", wavBytes({ channels: [left], header: { bits: 12 } }), "wav-bits"],
    ["a frame that doesn't add up", wavBytes({ channels: [left], header: { frameBytes: 3 } }), "wav-format-broken"],
    ["a data size of half a frame", wavBytes({ channels: [left], dataSize: 999 }), "wav-partial-frame"],
  ])("refuses %s", (_what, bytes, code) => {
    expect(codeOf(() => readAll(bytes))).toBe(code);
    expect(codeOf(() => readAll(bytes, 1, 1))).toBe(code);
  });

  it("refuses a channel that the file doesn't have", () => {
    expect(codeOf(() => readAll(wavBytes({ channels: [left, right] }), 3))).toBe("channel-missing");
  });

  it("answers any bytes with samples or a refusal, never another error", async () => {
    const good = wavBytes({ channels: [noise(3, 60000, 0.1)], sampleRateHz: 48000 });
    await fc.assert(
      fc.asyncProperty(
        fc.array(fc.tuple(fc.integer({ min: 0, max: 60 }), fc.integer({ min: 0, max: 255 })), { maxLength: 6 }),
        fc.integer({ min: 0, max: good.length }),
        async (changes, length) => {
          const bytes = good.slice(0, length % 3 === 0 ? good.length : length);
          for (const [at, value] of changes) if (at < bytes.length) bytes[at] = value;
          const answer = await analyseRecording(bytes, { calibration: { fullScaleDb: 94 } }).then(
            ({ report }) => report.kind,
            (error: unknown) => error,
          );
          expect(answer === "sound" || answer instanceof Refusal).toBe(true);
        },
      ),
      { numRuns: 150 },
    );
  });
});
