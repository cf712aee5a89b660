import { addTone, noise, wavBytes, type WavSpec } from "../unit/acoustics/wav-bytes";

export const rateHz = 48_000;
/** Level of an rms of 1 re full scale in the recordings below, dB: a calibrator at 94 dB comes in at an rms of 0.05. */
export const fullScaleDb = 94 - 20 * Math.log10(0.05);
/** Rms re full scale of a level in dB. Definition of the level. */
export const rmsOf = (levelDb: number): number => 10 ** ((levelDb - fullScaleDb) / 20);

export type Encoding = Pick<WavSpec, "encoding" | "bits" | "extensible">;
export const encodings: readonly (readonly [string, Encoding])[] = [
  ["16-bit", { encoding: "int", bits: 16 }],
  ["24-bit", { encoding: "int", bits: 24, extensible: true }],
  ["float32", { encoding: "float", bits: 32 }],
];

const silence = (seconds: number): Float64Array => new Float64Array(Math.round(seconds * rateHz));

/** A calibrator's 1 kHz tone at a level in dB, where 94 dB has an rms of 0.05. */
export function calibratorWav({ levelDb = 94, seconds = 4, encoding = {} as Encoding } = {}): Uint8Array {
  return wavBytes({ channels: [addTone(silence(seconds), 1000, rmsOf(levelDb))], ...encoding });
}

export interface FanRecording {
  /** Tones by frequency in Hz and level in dB. */
  tones?: readonly (readonly [hz: number, levelDb: number])[];
  /** White noise up to half the sample rate: its whole level, dB. */
  noiseDb?: number;
  seconds?: number;
  seed?: number;
  encoding?: Encoding;
  /** A second channel that holds something else. */
  stereo?: boolean;
  /** From here, in s, a bang of a second, 20 dB up. */
  bangAtS?: number;
}

/** A fan's recording of closed form: sines of known levels in white noise of a known level. */
export function fanWav(spec: FanRecording = {}): Uint8Array {
  const { tones = [], noiseDb = 40, seconds = 12, seed = 7, encoding = {}, stereo = false, bangAtS } = spec;
  const samples = noise(seed, Math.round(seconds * rateHz), rmsOf(noiseDb));
  for (const [hz, levelDb] of tones) addTone(samples, hz, rmsOf(levelDb));
  if (bangAtS !== undefined) {
    const from = Math.round(bangAtS * rateHz);
    for (let i = from; i < from + rateHz; i += 1) samples[i] = 10 * (samples[i] ?? 0);
  }
  const other = stereo ? [noise(seed + 1, samples.length, rmsOf(60))] : [];
  return wavBytes({ channels: [samples, ...other], ...encoding });
}
