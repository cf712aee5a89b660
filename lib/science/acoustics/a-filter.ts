import { WEIGHTING_POLES_HZ } from "./weighting";

/** Denominators 1 + a₁z⁻¹ + a₂z⁻² of three sections; numerators are (1 − z⁻¹)², (1 − z⁻¹)² and (1 + z⁻¹)². */
interface Sections {
  gain: number;
  denominators: readonly [number, number][];
}

/**
 * Digital A weighting: bilinear transform of the analogue poles without pre-warping, 0 dB at 1 kHz.
 *
 * In: sample rate in Hz. It reads low near half the sample rate (−1.2 dB at 10 kHz, 48 kHz rate), so it serves to
 * compare seconds of one recording; levels are weighted line by line. Source: IEC 61672-1:2013 Annex E poles.
 */
export function digitalAWeighting(sampleRateHz: number): Sections {
  const [p1, p2, p3, p4] = WEIGHTING_POLES_HZ.map((pole) => {
    const warped = (Math.PI * pole) / sampleRateHz;
    return (1 - warped) / (1 + warped);
  }) as [number, number, number, number];
  const denominators: [number, number][] = [
    [-2 * p1, p1 * p1],
    [-(p2 + p3), p2 * p3],
    [-2 * p4, p4 * p4],
  ];
  const raw = { gain: 1, denominators };
  return { gain: 10 ** (-responseDb(raw, 1000, sampleRateHz) / 20), denominators };
}

/** Magnitude of the digital weighting in dB at a frequency in Hz below half the sample rate. */
export function responseDb({ gain, denominators }: Sections, frequencyHz: number, sampleRateHz: number): number {
  const angle = (2 * Math.PI * frequencyHz) / sampleRateHz;
  const zeros = (2 * Math.sin(angle / 2)) ** 4 * (2 * Math.cos(angle / 2)) ** 2;
  const poles = denominators.reduce((product, [a1, a2]) => {
    const re = 1 + a1 * Math.cos(angle) + a2 * Math.cos(2 * angle);
    const im = a1 * Math.sin(angle) + a2 * Math.sin(2 * angle);
    return product * Math.hypot(re, im);
  }, 1);
  return 20 * Math.log10((gain * zeros) / poles);
}

/** Sums the square of A-weighted samples, piece by piece. The first sample sets the resting point, so an offset is no step. */
export class AWeightedPower {
  private readonly sections: Sections;
  private readonly state = new Float64Array(6);
  private rest: number | undefined;

  constructor(sampleRateHz: number) {
    this.sections = digitalAWeighting(sampleRateHz);
  }

  /** Σ of the squared A-weighted samples[from … to), in the unit squared. */
  sum(samples: Float64Array, from: number, to: number): number {
    const { gain, denominators } = this.sections;
    const [[a1 = 0, a2 = 0] = [], [b1 = 0, b2 = 0] = [], [c1 = 0, c2 = 0] = []] = denominators;
    const rest = (this.rest ??= samples[from] ?? 0);
    let [s1 = 0, s2 = 0, s3 = 0, s4 = 0, s5 = 0, s6 = 0] = this.state;
    let power = 0;
    for (let i = from; i < to; i += 1) {
      const x = ((samples[i] ?? 0) - rest) * gain;
      const y = x + s1;
      s1 = s2 - 2 * x - a1 * y;
      s2 = x - a2 * y;
      const u = y + s3;
      s3 = s4 - 2 * y - b1 * u;
      s4 = y - b2 * u;
      const v = u + s5;
      s5 = s6 + 2 * u - c1 * v;
      s6 = u - c2 * v;
      power += v * v;
    }
    // Values that have died away are set to 0: the processor is slow on numbers that small.
    [s1, s2, s3, s4, s5, s6].forEach((value, i) => (this.state[i] = Math.abs(value) < 1e-60 ? 0 : value));
    return power;
  }
}
