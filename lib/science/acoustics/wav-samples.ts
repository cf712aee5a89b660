import { Refusal } from "../refusal";
import type { WavFormat } from "./wav-format";

/**
 * Reads samples of one channel out of whole frames into `out`, full scale 1.
 *
 * In: bytes that begin at a frame, the frame count, the channel from 0. Integers are divided by 2^(bits − 1); 8 bits are
 * unsigned about 128. Little-endian. Source: RIFF/WAVE (common practice, value from memory).
 */
export function decodeFrames(
  bytes: Uint8Array,
  frames: number,
  format: WavFormat,
  channel: number,
  out: Float64Array,
): void {
  const { bits, frameBytes, encoding } = format;
  const first = channel * (bits / 8);
  if (encoding === "float") {
    const view = new DataView(bytes.buffer, bytes.byteOffset, bytes.byteLength);
    for (let i = 0, at = first; i < frames; i += 1, at += frameBytes) {
      out[i] = bits === 32 ? view.getFloat32(at, true) : view.getFloat64(at, true);
    }
  } else if (bits === 8) {
    for (let i = 0, at = first; i < frames; i += 1, at += frameBytes) out[i] = ((bytes[at] ?? 128) - 128) / 128;
  } else if (bits === 16) {
    for (let i = 0, at = first; i < frames; i += 1, at += frameBytes) {
      out[i] = ((((bytes[at] ?? 0) | ((bytes[at + 1] ?? 0) << 8)) << 16) >> 16) / 32768;
    }
  } else if (bits === 24) {
    for (let i = 0, at = first; i < frames; i += 1, at += frameBytes) {
      const value = (bytes[at] ?? 0) | ((bytes[at + 1] ?? 0) << 8) | ((bytes[at + 2] ?? 0) << 16);
      out[i] = ((value << 8) >> 8) / 8388608;
    }
  } else {
    const view = new DataView(bytes.buffer, bytes.byteOffset, bytes.byteLength);
    for (let i = 0, at = first; i < frames; i += 1, at += frameBytes) out[i] = view.getInt32(at, true) / 2147483648;
  }
}

/** Magnitude re full scale from which three samples in a row count as clipped (threshold of the house). */
export const CLIP_LEVEL = 0.999;

/**
 * Watches samples for what makes a level meaningless: clipping and values that are no numbers.
 *
 * Clipped: three samples in a row at 0.999 of full scale or more, or an integer at its very limit twice in a row.
 * Sample numbers count from 1. Threshold of the house, no source.
 */
export class SampleGuard {
  private readonly lowest: number;
  /** Nearest magnitude that can matter; 8-bit samples end below CLIP_LEVEL. */
  private readonly near: number;
  private readonly highest: number;
  private high = 0;
  private limit = 0;
  private seen = 0;

  constructor(
    format: WavFormat,
    private readonly what: string,
  ) {
    const isInt = format.encoding === "int";
    this.lowest = isInt ? -1 : -Infinity;
    this.highest = isInt ? 1 - 2 ** (1 - format.bits) : Infinity;
    this.near = Math.min(CLIP_LEVEL, this.highest);
  }

  check(samples: Float64Array, count: number): void {
    const { lowest, highest, near } = this;
    let { high, limit } = this;
    for (let i = 0; i < count; i += 1) {
      const sample = samples[i] ?? 0;
      if (sample < near && sample > -near) {
        high = 0;
        limit = 0;
        continue;
      }
      if (!Number.isFinite(sample)) {
        throw new Refusal("wav-not-finite", `${this.what}: a sample is not a number.`, `sample ${this.seen + i + 1}`);
      }
      high = Math.abs(sample) >= CLIP_LEVEL ? high + 1 : 0;
      limit = sample === lowest || sample === highest ? limit + 1 : 0;
      if (high >= 3 || limit >= 2) {
        throw new Refusal(
          "clipped",
          `${this.what} is clipped: its level can't be known.`,
          `sample ${this.seen + i + 1}`,
        );
      }
    }
    this.high = high;
    this.limit = limit;
    this.seen += count;
  }
}
