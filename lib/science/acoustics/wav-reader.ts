import { Refusal } from "../refusal";
import { parseWavFormat, type WavFormat } from "./wav-format";
import { decodeFrames } from "./wav-samples";

/** Longest format chunk that is read; every known one is 16 to 40 bytes. */
const FORMAT_LIMIT = 4096;
/** Writers that can't seek back leave such sizes; from here up a size that the file doesn't reach means "to the end". */
const STREAMED_SIZE = 0x7ffff000;
/** Bytes that are decoded at a time, so that memory doesn't grow with the file. */
const PIECE_BYTES = 1 << 18;

export interface WavSink {
  /** Called once, before any sample. */
  format(format: WavFormat): void;
  /** Samples of the channel, full scale 1; the array is used again after the call. */
  samples(values: Float64Array, count: number): void;
}

type State = "riff" | "header" | "format" | "skip" | "after-empty" | "data" | "done";

/**
 * Reads a WAV file from pieces of any size, one channel of it (from 1), in bounded memory. With `orMono` a file of one
 * channel gives that one, whichever is wanted.
 *
 * Chunks are word-aligned and unknown ones skipped; a data size left open by a streaming writer means to the end of the
 * file, and so does a size of 0 where what follows is no chunk (a recorder that was cut off). Refused with a code and the
 * byte: not a WAV, no format, no samples, truncated, a last frame that is not whole.
 * Source: RIFF/WAVE (Microsoft, 1994; value from memory, common practice).
 */
export class WavReader {
  private state: State = "riff";
  private held: Uint8Array<ArrayBufferLike> = new Uint8Array(0);
  private offset = 0;
  private remaining = 0;
  private padding = 0;
  private streamed = false;
  private riffSize = 0;
  private wav: WavFormat | undefined;
  private channel = 0;
  private block = new Float64Array(0);
  private frames = 0;

  constructor(
    private readonly wanted: { channel: number; orMono?: boolean },
    private readonly what: string,
    private readonly sink: WavSink,
  ) {}

  /** Takes the next bytes of the file. */
  push(bytes: Uint8Array): void {
    let rest = bytes;
    while (rest.length > 0 && this.state !== "done") {
      if (this.state === "skip") rest = this.skip(rest);
      else if (this.state === "data") rest = this.data(rest);
      else rest = this.gather(rest, this.state);
    }
  }

  /** Says that the file ends here; returns the number of frames read. */
  end(): number {
    if (this.offset === 0 && this.held.length === 0) this.refuse("empty-file", "holds no bytes");
    if (this.state === "riff") this.refuse("not-wav", "ends before a WAV header is complete");
    const short = this.state === "data" && !this.streamed;
    if (short || this.state === "format") {
      this.refuse("wav-truncated", `is truncated: ${this.remaining} bytes that it announces are missing`);
    }
    if (this.wav === undefined) this.refuse("wav-no-format", "has no format chunk");
    if (!["data", "done", "after-empty"].includes(this.state)) this.refuse("wav-no-data", "has no data chunk");
    if (this.frames === 0) this.refuse("wav-no-samples", "holds no samples");
    return this.frames;
  }

  private refuse(code: string, reason: string): never {
    throw new Refusal(
      code,
      `${this.what} ${reason}.`,
      `byte ${this.offset + (this.state === "data" ? 0 : this.held.length)}`,
    );
  }

  /** Collects the few bytes that a header needs, then reads them. */
  private gather(bytes: Uint8Array, state: Exclude<State, "skip" | "data" | "done">): Uint8Array {
    const needed = state === "riff" ? 12 : state === "format" ? this.remaining + this.held.length : 8;
    const take = Math.min(needed - this.held.length, bytes.length);
    const joined = new Uint8Array(this.held.length + take);
    joined.set(this.held);
    joined.set(bytes.subarray(0, take), this.held.length);
    this.held = joined;
    if (state === "format") this.remaining -= take;
    if (joined.length === needed) {
      if (state === "after-empty") return this.afterEmpty(joined, bytes.subarray(take));
      if (state === "riff") this.riff(joined);
      else if (state === "header") this.header(joined);
      else {
        this.wav = parseWavFormat(joined, this.offset);
        const { channels } = this.wav;
        if (!(channels === 1 && this.wanted.orMono === true)) this.channel = this.wanted.channel - 1;
        if (this.channel >= channels) {
          throw new Refusal(
            "channel-missing",
            `${this.what} has ${channels} channels, no channel ${this.wanted.channel}.`,
          );
        }
        this.sink.format(this.wav);
        this.startSkip(this.padding);
      }
      this.offset += joined.length;
      this.held = new Uint8Array(0);
    }
    return bytes.subarray(take);
  }

  /** What stands behind a data chunk of no bytes: another chunk within the file's size, or samples never counted. */
  private afterEmpty(head: Uint8Array, rest: Uint8Array): Uint8Array {
    this.held = new Uint8Array(0);
    const to = this.offset + 8 + new DataView(head.buffer).getUint32(4, true);
    if (/^[\w -]{4}$/.test(ascii(head, 0)) && to <= this.riffSize + 9) {
      this.state = "done";
      return rest.subarray(rest.length);
    }
    this.streamed = true;
    this.remaining = Infinity;
    this.state = "data";
    let left = head;
    while (left.length > 0) left = this.data(left);
    return rest;
  }

  private startSkip(size: number): void {
    this.remaining = size;
    this.state = size > 0 ? "skip" : "header";
  }

  private riff(head: Uint8Array): void {
    const name = ascii(head, 0);
    if (name !== "RIFF" || ascii(head, 8) !== "WAVE") this.refuse("not-wav", "is not a RIFF/WAVE file");
    this.riffSize = new DataView(head.buffer).getUint32(4, true);
    this.state = "header";
  }

  private header(head: Uint8Array): void {
    const name = ascii(head, 0);
    const size = new DataView(head.buffer).getUint32(4, true);
    this.padding = size % 2;
    if (name === "fmt ") {
      if (size > FORMAT_LIMIT) this.refuse("wav-format-broken", `announces a format chunk of ${size} bytes`);
      if (this.wav !== undefined) this.refuse("wav-format-broken", "has two format chunks");
      this.remaining = size;
      if (size === 0) this.refuse("wav-format-broken", "has an empty format chunk");
      this.state = "format";
    } else if (name === "data") {
      if (this.wav === undefined) this.refuse("wav-no-format", "has data before any format chunk");
      const open = size === 0 && (this.riffSize === 0 || this.riffSize >= STREAMED_SIZE);
      this.streamed = open || size >= STREAMED_SIZE;
      this.remaining = open ? Infinity : size;
      if (!this.streamed && size % this.wav.frameBytes !== 0) {
        this.refuse("wav-partial-frame", `announces ${size} bytes of samples, which are no whole frames`);
      }
      this.state = this.remaining > 0 ? "data" : "after-empty";
    } else this.startSkip(size + this.padding);
  }

  private skip(bytes: Uint8Array): Uint8Array {
    const take = Math.min(this.remaining, bytes.length);
    this.remaining -= take;
    this.offset += take;
    if (this.remaining === 0) this.state = "header";
    return bytes.subarray(take);
  }

  private data(bytes: Uint8Array): Uint8Array {
    if (this.wav === undefined) return bytes.subarray(bytes.length);
    const { frameBytes } = this.wav;
    if (this.held.length > 0 || bytes.length < frameBytes) {
      // A frame lies across two pieces: put it together first.
      const take = Math.min(frameBytes - this.held.length, bytes.length, this.remaining);
      const joined = new Uint8Array(this.held.length + take);
      joined.set(this.held);
      joined.set(bytes.subarray(0, take), this.held.length);
      this.held = joined;
      this.consume(take);
      if (joined.length === frameBytes) {
        this.emit(joined, 1);
        this.held = new Uint8Array(0);
      }
      return this.afterData(bytes.subarray(take));
    }
    const frames = Math.floor(Math.min(bytes.length, this.remaining, Math.max(PIECE_BYTES, frameBytes)) / frameBytes);
    if (frames === 0) {
      this.held = bytes.slice(0, Math.min(bytes.length, this.remaining));
      const { length } = this.held;
      this.consume(length);
      return this.afterData(bytes.subarray(length));
    }
    this.emit(bytes, frames);
    this.consume(frames * frameBytes);
    return this.afterData(bytes.subarray(frames * frameBytes));
  }

  private consume(bytes: number): void {
    this.remaining -= bytes;
    this.offset += bytes;
  }

  private afterData(rest: Uint8Array): Uint8Array {
    if (this.remaining === 0) this.state = "done";
    return rest;
  }

  private emit(bytes: Uint8Array, frames: number): void {
    if (this.wav === undefined) return;
    if (this.block.length < frames) this.block = new Float64Array(frames);
    decodeFrames(bytes, frames, this.wav, this.channel, this.block);
    this.frames += frames;
    this.sink.samples(this.block, frames);
  }
}

function ascii(bytes: Uint8Array, from: number): string {
  return String.fromCharCode(...bytes.subarray(from, from + 4));
}
