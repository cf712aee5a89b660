import { AWeightedPower } from "./a-filter";

/** A second is disturbed when its level is more than this above the median, dB. Common practice, no source. */
export const DISTURBED_DB = 3;

export interface Second {
  /** A-weighted level re full scale, dB; -Infinity for silence. */
  levelDb: number;
  /** First sample and the one after the last. */
  from: number;
  to: number;
  /** False where every sample is the same. */
  sounds: boolean;
}

/** Cuts a recording into seconds and takes the A-weighted level of each. A rest under a quarter second joins the last. */
export class SecondLevels {
  private readonly filter: AWeightedPower;
  private readonly seconds: Second[] = [];
  private power = 0;
  private count = 0;
  private start = 0;
  private sounds = false;
  private previous: number | undefined;

  constructor(private readonly sampleRateHz: number) {
    this.filter = new AWeightedPower(sampleRateHz);
  }

  push(samples: Float64Array, count: number): void {
    let at = 0;
    while (at < count) {
      const to = Math.min(count, at + this.sampleRateHz - this.count);
      this.power += this.filter.sum(samples, at, to);
      if (!this.sounds) this.sounds = this.differs(samples, at, to);
      this.previous = samples[to - 1];
      this.count += to - at;
      at = to;
      if (this.count === this.sampleRateHz) this.close();
    }
  }

  private differs(samples: Float64Array, from: number, to: number): boolean {
    const first = this.count === 0 ? samples[from] : this.previous;
    for (let i = from; i < to; i += 1) if (samples[i] !== first) return true;
    return false;
  }

  private close(): void {
    const levelDb = this.sounds ? 10 * Math.log10(this.power / this.count) : -Infinity;
    this.seconds.push({ levelDb, from: this.start, to: this.start + this.count, sounds: this.sounds });
    this.start += this.count;
    this.power = 0;
    this.count = 0;
    this.sounds = false;
  }

  finish(): Second[] {
    const last = this.seconds.at(-1);
    if (last !== undefined && this.count > 0 && this.count < this.sampleRateHz / 4) {
      last.to += this.count;
      last.sounds ||= this.sounds;
    } else if (this.count > 0) this.close();
    return this.seconds;
  }
}

/** Median level in dB; the mean of the middle two for an even count; undefined for none. */
export function medianDb(levelsDb: readonly number[]): number | undefined {
  const sorted = Float64Array.from(levelsDb).sort();
  const middle = sorted.length >> 1;
  const upper = sorted[middle];
  if (upper === undefined || sorted.length % 2 === 1) return upper;
  const lower = sorted[middle - 1] ?? upper;
  return lower === upper ? upper : (lower + upper) / 2;
}

/** Marks the seconds whose level is more than 3 dB above the median; compared after rounding to 9 decimals. */
export function disturbedSeconds(seconds: readonly Second[]): boolean[] {
  const median = medianDb(seconds.map(({ levelDb }) => levelDb));
  return seconds.map(({ levelDb }) => {
    if (median === undefined || levelDb === -Infinity) return false;
    if (median === -Infinity) return true;
    return Math.round((levelDb - median) * 1e9) / 1e9 > DISTURBED_DB;
  });
}

/** Marks the seconds within a distance of the median, in dB: where a calibrator was on and settled. */
export function steadySeconds(seconds: readonly Second[], withinDb: number): boolean[] {
  const median = medianDb(seconds.map(({ levelDb }) => levelDb)) ?? -Infinity;
  return seconds.map(({ levelDb }) => Math.abs(levelDb - median) <= withinDb);
}

/** Joins marked seconds that adjoin into runs of samples. */
export function runsOf(seconds: readonly Second[], marked: readonly boolean[]): { from: number; to: number }[] {
  const runs: { from: number; to: number }[] = [];
  seconds.forEach(({ from, to }, i) => {
    if (marked[i] !== true) return;
    const last = runs.at(-1);
    if (last?.to === from) last.to = to;
    else runs.push({ from, to });
  });
  return runs;
}
