/** Cosine-sum coefficients a₀, a₁, … with alternating signs, as in Harris (1978) and scipy.signal.windows. */
const COEFFICIENTS = {
  boxcar: [1],
  hann: [0.5, 0.5],
  blackman: [0.42, 0.5, 0.08],
  blackmanharris: [0.35875, 0.48829, 0.14128, 0.01168],
  flattop: [0.21557895, 0.41663158, 0.277263158, 0.083578947, 0.006947368],
} as const;

export type WindowName = keyof typeof COEFFICIENTS;

/**
 * Periodic (DFT-even) window w[i] = Σ (−1)^k a_k cos(2πki/N), dimensionless, N values.
 * Source: Harris (1978), Proc. IEEE 66:51–83; identical to scipy.signal.windows with sym=False.
 */
export function windowSamples(name: WindowName, length: number): Float64Array {
  const window = new Float64Array(length);
  for (let i = 0; i < length; i += 1) {
    let value = 0;
    COEFFICIENTS[name].forEach((coefficient, k) => {
      value += (k % 2 === 0 ? 1 : -1) * coefficient * Math.cos((2 * Math.PI * k * i) / length);
    });
    window[i] = value;
  }
  return window;
}

export interface WindowMetrics {
  /** mean(w): a single line's amplitude is divided by it. */
  coherentGain: number;
  /** mean(w²): powers and band sums are divided by it. */
  meanSquare: number;
  /** Equivalent noise bandwidth in lines: meanSquare / coherentGain². */
  noiseBandwidthLines: number;
}

/** Gains of a window; the two corrections are never mixed. Source: definitions, Harris (1978). */
export function windowMetrics(window: Float64Array): WindowMetrics {
  let sum = 0;
  let squares = 0;
  for (const value of window) {
    sum += value;
    squares += value * value;
  }
  const coherentGain = sum / window.length;
  const meanSquare = squares / window.length;
  return { coherentGain, meanSquare, noiseBandwidthLines: meanSquare / coherentGain ** 2 };
}
