import { Refusal } from "../refusal";
import { disturbedSeconds, runsOf, SecondLevels, steadySeconds } from "./seconds";
import type { WavFormat } from "./wav-format";
import { WavReader } from "./wav-reader";
import { SampleGuard } from "./wav-samples";
import { blockLengthFor, Welch, type Spectrum } from "./welch";

/** The bytes of a file, or a way to go through them from the start; it is gone through twice. */
export type ByteSource = Uint8Array | ArrayBuffer | (() => Iterable<Uint8Array> | AsyncIterable<Uint8Array>);

/** Under this, in s, a recording is refused. */
export const SHORTEST_S = 1;
/** A second of calibrator tone counts where it is this near to the median, dB. Threshold of the house, no source. */
const STEADY_DB = 0.5;

export interface Recording {
  format: WavFormat;
  durationS: number;
  usedS: number;
  /** Stretches that were left out, in s, rising. */
  disturbed: { fromS: number; toS: number }[];
  /** Over the used seconds, in full scale squared per Hz; undefined for digital silence. */
  spectrum: Spectrum | undefined;
  /** Seconds within the used ones in which every sample is the same. */
  silentSeconds: number;
  /** A-weighted level of each second re full scale, dB. */
  secondsDb: number[];
}

export interface ReadOptions {
  /** Channel, from 1. */
  channel: number;
  /** Reads the only channel of a mono file, whichever is asked for: calibrator and background files often are. */
  orMono?: boolean;
  /** What the file is called in messages, such as "The recording". */
  what: string;
  /** "undisturbed" leaves out what is more than 3 dB above the median; "steady" keeps what is near it. */
  keep: "undisturbed" | "steady";
  /** Called with the bytes gone through so far; each file is gone through twice. */
  onBytes?: (bytes: number) => void;
}

function piecesOf(source: ByteSource): Iterable<Uint8Array> | AsyncIterable<Uint8Array> {
  if (typeof source === "function") return source();
  return [source instanceof ArrayBuffer ? new Uint8Array(source) : source];
}

const SLICE_BYTES = 1 << 20;

async function feed(source: ByteSource, reader: WavReader, onBytes: (bytes: number) => void): Promise<number> {
  for await (const piece of piecesOf(source)) {
    for (let at = 0; at < piece.length; at += SLICE_BYTES) {
      const slice = piece.subarray(at, at + SLICE_BYTES);
      reader.push(slice);
      onBytes(slice.length);
    }
  }
  return reader.end();
}

/**
 * Reads one channel of a WAV recording into the spectrum of its used seconds, in two passes and bounded memory.
 *
 * Refused: what WavReader and SampleGuard refuse (broken, truncated, clipped, not finite) and less than 1 s.
 * Levels come out re full scale; calibration is the caller's. Source: docblocks of the parts.
 */
export async function readRecording(source: ByteSource, options: ReadOptions): Promise<Recording> {
  const { what } = options;
  const wanted = { channel: options.channel, orMono: options.orMono ?? false };
  let done = 0;
  const onBytes = (bytes: number) => options.onBytes?.((done += bytes));

  let first: { format: WavFormat; guard: SampleGuard; levels: SecondLevels } | undefined;
  const reader = new WavReader(wanted, what, {
    format: (format) => {
      first = { format, guard: new SampleGuard(format, what), levels: new SecondLevels(format.sampleRateHz) };
    },
    samples: (values, count) => {
      first?.guard.check(values, count);
      first?.levels.push(values, count);
    },
  });
  const frames = await feed(source, reader, onBytes);
  if (first === undefined) throw new Refusal("wav-no-format", `${what} has no format chunk.`);
  const { format, levels } = first;
  const { sampleRateHz } = format;
  const durationS = frames / sampleRateHz;
  if (durationS < SHORTEST_S) {
    throw new Refusal("too-short", `${what} lasts ${durationS.toFixed(2)} s; a level needs 1 s or more.`);
  }

  const seconds = levels.finish();
  const left =
    options.keep === "steady" ? steadySeconds(seconds, STEADY_DB).map((steady) => !steady) : disturbedSeconds(seconds);
  const kept = left.map((out) => !out);
  const blockLength = blockLengthFor(sampleRateHz);
  const runs = runsOf(seconds, kept).filter(({ from, to }) => to - from >= blockLength);
  const used = seconds.filter(({ from }) => runs.some((run) => from >= run.from && from < run.to));
  const silent = !used.some(({ sounds }) => sounds);
  return {
    format,
    durationS,
    usedS: runs.reduce((sum, { from, to }) => sum + to - from, 0) / sampleRateHz,
    disturbed: runsOf(seconds, left).map(({ from, to }) => ({ fromS: from / sampleRateHz, toS: to / sampleRateHz })),
    spectrum: silent ? undefined : await spectrumOf(source, { wanted, what, runs, sampleRateHz, blockLength, onBytes }),
    silentSeconds: used.filter(({ sounds }) => !sounds).length,
    secondsDb: seconds.map(({ levelDb }) => levelDb),
  };
}

async function spectrumOf(
  source: ByteSource,
  input: {
    wanted: { channel: number; orMono: boolean };
    what: string;
    runs: readonly { from: number; to: number }[];
    sampleRateHz: number;
    blockLength: number;
    onBytes: (bytes: number) => void;
  },
): Promise<Spectrum | undefined> {
  const { runs, sampleRateHz, blockLength } = input;
  const average = new Welch({ sampleRateHz, blockLength });
  let at = 0;
  let run = 0;
  const reader = new WavReader(input.wanted, input.what, {
    format: () => undefined,
    samples: (values, count) => {
      const end = at + count;
      for (let current = runs[run]; current !== undefined && current.from < end; current = runs[run]) {
        average.push(values, Math.max(current.from, at) - at, Math.min(current.to, end) - at);
        if (current.to > end) break;
        average.endRun();
        run += 1;
      }
      at = end;
    },
  });
  await feed(source, reader, input.onBytes);
  const spectrum = average.finish();
  return spectrum?.psd.some((line) => line > 0) === true ? spectrum : undefined;
}
