import { RealPowerFft } from "./fft";
import { windowSamples, type WindowName } from "./windows";

/** One-sided power spectral density: `psd[k]`, in the signal's unit squared per Hz, at k·spacingHz. */
export interface Spectrum {
  spacingHz: number;
  psd: Float64Array;
  /** Number of averaged blocks, which sets how far a line strays by chance. */
  blocks: number;
}

export interface WelchOptions {
  sampleRateHz: number;
  /** Block length in samples, a power of two. */
  blockLength: number;
  window?: WindowName;
  /** "constant" takes the mean out of each block, as scipy.signal.welch does unless told otherwise. */
  detrend?: "constant" | "none";
}

/**
 * Block length for a sample rate: the largest power of two that fits into one second, so that lines are 1 to 2 Hz
 * apart (1.46 Hz at 48 kHz) and any undisturbed second holds a block.
 */
export function blockLengthFor(sampleRateHz: number): number {
  return 2 ** Math.floor(Math.log2(sampleRateHz));
}

/**
 * Welch's averaged periodogram with 50 % overlap, fed piece by piece.
 *
 * Runs of samples that don't adjoin are separated by `endRun`; no block spans two runs, and each run counts by its
 * length. For one run the result is scipy.signal.welch's (scaling "density"). Leftover samples at the end of a run
 * that don't fill a block are not used, as there.
 * Source: Welch (1967), IEEE Trans. Audio Electroacoust. AU-15:70–73.
 */
export class Welch {
  private readonly fft: RealPowerFft;
  private readonly window: Float64Array;
  private readonly detrend: boolean;
  private readonly spacingHz: number;
  private readonly scale: number;
  private readonly total: Float64Array;
  private readonly run: Float64Array;
  private readonly pending: Float64Array;
  private filled = 0;
  private runBlocks = 0;
  private runSamples = 0;
  private weight = 0;
  private blocks = 0;

  constructor(options: WelchOptions) {
    const { blockLength, sampleRateHz } = options;
    this.fft = new RealPowerFft(blockLength);
    this.window = windowSamples(options.window ?? "hann", blockLength);
    this.detrend = (options.detrend ?? "constant") === "constant";
    this.spacingHz = sampleRateHz / blockLength;
    const squares = this.window.reduce((sum, value) => sum + value * value, 0);
    this.scale = 1 / (sampleRateHz * squares);
    this.total = new Float64Array(blockLength / 2 + 1);
    this.run = new Float64Array(blockLength / 2 + 1);
    this.pending = new Float64Array(blockLength);
  }

  /** Adds samples[from … to) to the current run. */
  push(samples: Float64Array, from = 0, to = samples.length): void {
    const size = this.pending.length;
    this.runSamples += to - from;
    let at = from;
    while (at < to) {
      if (this.filled === 0 && to - at >= size) {
        // A whole block lies in the input: no copy needed but for the half that the next block shares.
        this.add(samples, at);
        at += size / 2;
        if (to - at < size) {
          this.pending.set(samples.subarray(at, at + size / 2));
          this.filled = size / 2;
          at += size / 2;
        }
        continue;
      }
      const take = Math.min(size - this.filled, to - at);
      this.pending.set(samples.subarray(at, at + take), this.filled);
      this.filled += take;
      at += take;
      if (this.filled === size) {
        this.add(this.pending, 0);
        this.pending.copyWithin(0, size / 2);
        this.filled = size / 2;
      }
    }
  }

  private add(samples: Float64Array, from: number): void {
    let even = 0;
    let odd = 0;
    if (this.detrend) {
      const to = from + this.fft.length;
      for (let i = from; i < to; i += 2) {
        even += samples[i] ?? 0;
        odd += samples[i + 1] ?? 0;
      }
    }
    this.fft.addPower(samples, from, this.window, (even + odd) / this.fft.length, this.run);
    this.runBlocks += 1;
  }

  /** Closes the current run; the next sample pushed begins another. */
  endRun(): void {
    if (this.runBlocks > 0) {
      const share = this.runSamples / this.runBlocks;
      for (let k = 0; k < this.run.length; k += 1) this.total[k] = (this.total[k] ?? 0) + share * (this.run[k] ?? 0);
      this.weight += this.runSamples;
      this.blocks += this.runBlocks;
      this.run.fill(0);
    }
    this.filled = 0;
    this.runBlocks = 0;
    this.runSamples = 0;
  }

  /** The averaged spectrum; undefined where no run filled a block. */
  finish(): Spectrum | undefined {
    this.endRun();
    if (this.weight === 0) return undefined;
    const last = this.total.length - 1;
    const psd = this.total.map((value, k) => (value * this.scale * (k === 0 || k === last ? 1 : 2)) / this.weight);
    return { spacingHz: this.spacingHz, psd, blocks: this.blocks };
  }
}

/** Welch spectrum of one array of samples; undefined where it holds less than a block. See the class. */
export function welch(samples: Float64Array, options: WelchOptions): Spectrum | undefined {
  const average = new Welch(options);
  average.push(samples);
  return average.finish();
}
