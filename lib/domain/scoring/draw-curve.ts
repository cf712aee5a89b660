import { METHOD_V1 } from "../results/methods/v1/parameters";

/** Reads at the levels, into `out`, the curve through the first `count` points of xs and ys, which it puts in order. */
export type DrawReader = (xs: Float64Array, ys: Float64Array, count: number, out: Float64Array) => void;

function at(values: Float64Array, i: number): number {
  return values[i] ?? Number.NaN;
}

/**
 * The curve reading of `curveKnots`, `pchip` and `valueWithStraightEnds` in one pass over buffers that are used again:
 * a standing reads some hundred thousand curves. A test holds the two to the same values. One knot alone is flat.
 */
export function drawReader(levelsDba: readonly number[]): DrawReader {
  return (xs, ys, count, out) => {
    sortPairs(xs, ys, count);
    const knots = mergePairs(xs, ys, count);
    levelsDba.forEach((level, i) => {
      out[i] = knots === 1 ? at(ys, 0) : readAt(xs, ys, knots, level);
    });
  };
}

function sortPairs(xs: Float64Array, ys: Float64Array, count: number): void {
  for (let i = 1; i < count; i++) {
    const x = at(xs, i);
    const y = at(ys, i);
    let j = i - 1;
    for (; j >= 0 && at(xs, j) > x; j--) {
      xs[j + 1] = at(xs, j);
      ys[j + 1] = at(ys, j);
    }
    xs[j + 1] = x;
    ys[j + 1] = y;
  }
}

function mergePairs(xs: Float64Array, ys: Float64Array, count: number): number {
  let knots = 0;
  for (let from = 0; from < count;) {
    let sumX = at(xs, from);
    let sumY = at(ys, from);
    let to = from + 1;
    while (to < count && Math.round((at(xs, to) - at(xs, to - 1)) * 1e9) / 1e9 < METHOD_V1.mergeWithinDb) {
      sumX += at(xs, to);
      sumY += at(ys, to);
      to++;
    }
    xs[knots] = sumX / (to - from);
    ys[knots] = sumY / (to - from);
    knots++;
    from = to;
  }
  return knots;
}

function readAt(xs: Float64Array, ys: Float64Array, knots: number, level: number): number {
  const last = knots - 1;
  if (level <= at(xs, 0)) return at(ys, 0) + slopeAt(xs, ys, knots, 0) * (level - at(xs, 0));
  if (level >= at(xs, last)) return at(ys, last) + slopeAt(xs, ys, knots, last) * (level - at(xs, last));
  let k = 0;
  while (at(xs, k + 1) < level) k++;
  const width = at(xs, k + 1) - at(xs, k);
  const chord = (at(ys, k + 1) - at(ys, k)) / width;
  const left = slopeAt(xs, ys, knots, k);
  const right = slopeAt(xs, ys, knots, k + 1);
  const s = (level - at(xs, k)) / width;
  return at(ys, k) + s * width * (left + s * (3 * chord - 2 * left - right + s * (left + right - 2 * chord)));
}

// No closures from here on: some run times name each one anew at every call, which costs more than the sums.
function widthAt(xs: Float64Array, k: number): number {
  return at(xs, k + 1) - at(xs, k);
}

function chordAt(xs: Float64Array, ys: Float64Array, k: number): number {
  return (at(ys, k + 1) - at(ys, k)) / widthAt(xs, k);
}

/** Slope of the curve at knot k (Fritsch and Butland 1984, three-point ends), as in `pchip`. */
function slopeAt(xs: Float64Array, ys: Float64Array, knots: number, k: number): number {
  if (knots === 2) return chordAt(xs, ys, 0);
  const before = chordAt(xs, ys, Math.max(0, k - 1));
  if (k === 0) return endSlope(widthAt(xs, 0), widthAt(xs, 1), before, chordAt(xs, ys, 1));
  if (k === knots - 1) return endSlope(widthAt(xs, k - 1), widthAt(xs, k - 2), before, chordAt(xs, ys, k - 2));
  const after = chordAt(xs, ys, k);
  if (!(before * after > 0)) return 0;
  const w1 = 2 * widthAt(xs, k) + widthAt(xs, k - 1);
  const w2 = widthAt(xs, k) + 2 * widthAt(xs, k - 1);
  return (w1 + w2) / (w1 / before + w2 / after);
}

function endSlope(h0: number, h1: number, m0: number, m1: number): number {
  const slope = ((2 * h0 + h1) * m0 - h0 * m1) / (h0 + h1);
  if (Math.sign(slope) !== Math.sign(m0)) return 0;
  return Math.sign(m0) !== Math.sign(m1) && Math.abs(slope) > 3 * Math.abs(m0) ? 3 * m0 : slope;
}
