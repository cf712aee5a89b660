/**
 * The figures of a small round by a way of their own: nothing of the product is called. Formulas as in the standards and
 * papers named beside each.
 */
export interface Point {
  levelReadDba: number;
  deltaTK: number;
  powerW: number;
}

/** Background correction, engineering grade: L − K₁ with K₁ = −10 lg(1 − 10^(−0.1 ΔL)) for 6 ≤ ΔL ≤ 15 dB (ISO 3744:2010, 8.2.3, Eq. (16)). */
export function correctedDba(levelDba: number, backgroundDba: number): number {
  const margin = levelDba - backgroundDba;
  if (margin > 15) return levelDba;
  if (margin < 6) throw new RangeError("this round is made to stay 6 dB clear of its background");
  return levelDba + 10 * Math.log10(1 - 10 ** (-0.1 * margin));
}

/**
 * Monotone cubic through three or more points at x: harmonic-mean slopes (Fritsch and Butland, SIAM J. Sci. Stat. Comput.
 * 5 (1984) 300), three-point ends held to the shape, Hermite form; the values that scipy's PchipInterpolator gives.
 */
export function monotoneCubic(points: readonly (readonly [number, number])[], x: number): number {
  const knots = [...points].sort((a, b) => a[0] - b[0]);
  const xs = knots.map((knot) => knot[0]);
  const ys = knots.map((knot) => knot[1]);
  const n = xs.length;
  const get = (list: readonly number[], i: number): number => {
    const value = list[i];
    if (value === undefined) throw new RangeError("outside the points");
    return value;
  };
  const h = Array.from({ length: n - 1 }, (_, i) => get(xs, i + 1) - get(xs, i));
  const d = h.map((width, i) => (get(ys, i + 1) - get(ys, i)) / width);
  const end = (h0: number, h1: number, d0: number, d1: number): number => {
    const slope = ((2 * h0 + h1) * d0 - h0 * d1) / (h0 + h1);
    if (Math.sign(slope) !== Math.sign(d0)) return 0;
    return Math.sign(d0) !== Math.sign(d1) && Math.abs(slope) > 3 * Math.abs(d0) ? 3 * d0 : slope;
  };
  const m = xs.map((_, i) => {
    if (i === 0) return end(get(h, 0), get(h, 1), get(d, 0), get(d, 1));
    if (i === n - 1) return end(get(h, n - 2), get(h, n - 3), get(d, n - 2), get(d, n - 3));
    if (get(d, i - 1) * get(d, i) <= 0) return 0;
    const w1 = 2 * get(h, i) + get(h, i - 1);
    const w2 = get(h, i) + 2 * get(h, i - 1);
    return (w1 + w2) / (w1 / get(d, i - 1) + w2 / get(d, i));
  });
  const k = Math.min(Math.max(xs.findIndex((knot) => knot >= x) - 1, 0), n - 2);
  const t = (x - get(xs, k)) / get(h, k);
  return (
    get(ys, k) * (1 + 2 * t) * (1 - t) ** 2 +
    get(h, k) * get(m, k) * t * (1 - t) ** 2 +
    get(ys, k + 1) * t * t * (3 - 2 * t) +
    get(h, k) * get(m, k + 1) * t * t * (t - 1)
  );
}

/** (ΔT/P) ÷ (ΔT/P of the baseline) at a level, each read off its own curve over corrected levels (product rule; handbook tables of PCHIP). */
export function ratioAtEqualNoise(
  entry: readonly Point[],
  baseline: readonly Point[],
  backgroundDba: number,
  levelDba: number,
): number {
  const at = (points: readonly Point[]) =>
    monotoneCubic(
      points.map((point) => [correctedDba(point.levelReadDba, backgroundDba), point.deltaTK / point.powerW] as const),
      levelDba,
    );
  return at(entry) / at(baseline);
}

/** ΔT of the baseline at a level, K, read off its own curve of ΔT over corrected level. */
export function baselineDeltaTK(baseline: readonly Point[], backgroundDba: number, levelDba: number): number {
  return monotoneCubic(
    baseline.map((point) => [correctedDba(point.levelReadDba, backgroundDba), point.deltaTK] as const),
    levelDba,
  );
}
