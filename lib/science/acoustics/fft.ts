import { firstStage, transformPart, unitCircle } from "./fft-stages";

/**
 * Power spectrum of real blocks by a mixed radix-8 and radix-4 transform of half the length.
 *
 * Length: a power of two, 8 or more. Work arrays hold real and imaginary parts side by side, which is how a real block
 * lies in memory already. The first stage splits it into four parts that are transformed one after the other, so that
 * a part, its scratch and its twiddles stay in the processor's cache. The arrays are kept between calls, so one
 * instance serves one thread of work.
 * Source: decimation in frequency, then Stockham's autosort form (Cochran et al. 1967, IEEE Trans. AU-15:45–55); real
 * input packed as a complex block of half the length.
 */
export class RealPowerFft {
  readonly length: number;
  private readonly data: Float64Array;
  private readonly scratch: Float64Array;
  /** The four parts of `data`: part r holds lines r, r + 4, r + 8, … of the packed block. */
  private readonly parts: readonly [Float64Array, Float64Array, Float64Array, Float64Array];
  private readonly firstTwiddle: Float64Array;
  private readonly partTwiddle: Float64Array;
  private readonly splitTwiddle: Float64Array;

  constructor(length: number) {
    if (!Number.isInteger(Math.log2(length)) || length < 8) {
      throw new RangeError("The transform length is a power of two, 8 or more.");
    }
    const half = length / 2;
    const part = half / 4;
    this.length = length;
    this.data = new Float64Array(length);
    this.scratch = new Float64Array(2 * part);
    const slice = (r: number) => this.data.subarray(2 * part * r, 2 * part * (r + 1));
    this.parts = [slice(0), slice(1), slice(2), slice(3)];
    this.firstTwiddle = unitCircle(part, half);
    this.partTwiddle = unitCircle(part, part);
    this.splitTwiddle = unitCircle(half / 2 + 1, length);
  }

  /**
   * Adds |X[k]|², k = 0 … length/2, of window·(block − offset) to `sum` (length/2 + 1 values).
   * The block starts at `from` in `samples`.
   */
  addPower(samples: Float64Array, from: number, window: Float64Array, offset: number, sum: Float64Array): void {
    firstStage(this.data, this.firstTwiddle, samples, from, window, offset);
    for (const part of this.parts) transformPart(part, this.scratch, this.partTwiddle);
    const half = this.length / 2;
    const re = this.data[0] ?? 0;
    const im = this.data[1] ?? 0;
    sum[0] = (sum[0] ?? 0) + (re + im) * (re + im);
    sum[half] = (sum[half] ?? 0) + (re - im) * (re - im);
    this.addPairs(sum, this.parts[0], this.parts[0], 4);
    this.addPairs(sum, this.parts[1], this.parts[3], 1);
    this.addPairs(sum, this.parts[2], this.parts[2], 2);
    this.addPairs(sum, this.parts[3], this.parts[1], 3);
  }

  /**
   * Takes lines k = firstLine, firstLine + 4, … up to half/2 of the real block's spectrum, and their mirrors half − k,
   * out of the packed one, and adds the powers. `mirror` is the part that holds line half − k.
   */
  private addPairs(sum: Float64Array, part: Float64Array, mirror: Float64Array, firstLine: number): void {
    const { splitTwiddle } = this;
    const half = this.length / 2;
    const middle = half / 2;
    let i = 2 * Math.floor(firstLine / 4);
    let j = mirror.length - 2;
    for (let k = firstLine; k <= middle; k += 4, i += 2, j -= 2) {
      const ar = part[i] ?? 0;
      const ai = part[i + 1] ?? 0;
      const br = mirror[j] ?? 0;
      const bi = mirror[j + 1] ?? 0;
      const evenRe = 0.5 * (ar + br);
      const evenIm = 0.5 * (ai - bi);
      const oddRe = 0.5 * (ai + bi);
      const oddIm = 0.5 * (br - ar);
      const wr = splitTwiddle[2 * k] ?? 0;
      const wi = splitTwiddle[2 * k + 1] ?? 0;
      const tr = oddRe * wr - oddIm * wi;
      const ti = oddRe * wi + oddIm * wr;
      const upRe = evenRe + tr;
      const upIm = evenIm + ti;
      sum[k] = (sum[k] ?? 0) + upRe * upRe + upIm * upIm;
      if (k === middle) break;
      const downRe = evenRe - tr;
      const downIm = evenIm - ti;
      sum[half - k] = (sum[half - k] ?? 0) + downRe * downRe + downIm * downIm;
    }
  }
}
