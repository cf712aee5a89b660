/** A monotone curve through measured points, as read between them and never outside. */
export interface Pchip {
  readonly xMin: number;
  readonly xMax: number;
  /** y at x, in the unit of y; undefined outside [xMin, xMax] or for NaN. */
  value(x: number): number | undefined;
  /** dy/dx at x; undefined outside. At an inner point both sides agree. */
  slope(x: number): number | undefined;
  /** The one x at which the curve has this y; undefined where none or more than one is. */
  inverse(y: number): number | undefined;
}

interface Knot {
  x: number;
  y: number;
  d: number;
}

/**
 * Piecewise cubic Hermite interpolation that keeps the data's monotony: F. N. Fritsch and R. E. Carlson, SIAM J.
 * Numer. Anal. 17 (1980) 238, with the harmonic slopes of F. N. Fritsch and J. Butland, SIAM J. Sci. Stat. Comput.
 * 5 (1984) 300, and their three-point ends. Two points give the straight line.
 * @param points at least two, in any order, x all different, all finite; units are the caller's.
 * @throws RangeError for fewer than two points, equal x or numbers that aren't finite.
 */
export function pchip(points: readonly { x: number; y: number }[]): Pchip {
  const sorted = [...points].sort((a, b) => a.x - b.x);
  if (sorted.length < 2) throw new RangeError("a curve needs at least two points");
  const knots = withSlopes(sorted);
  const xMin = sorted[0]?.x ?? Number.NaN;
  const xMax = sorted[sorted.length - 1]?.x ?? Number.NaN;
  return {
    xMin,
    xMax,
    value(x) {
      const found = segmentAt(knots, x);
      return found && cubic(found[0], found[1], x);
    },
    slope(x) {
      const found = segmentAt(knots, x);
      return found && cubicSlope(found[0], found[1], x);
    },
    inverse(y) {
      return inverse(knots, y);
    },
  };
}

/** The two neighbours between which x lies; undefined outside the curve and for NaN. */
function segmentAt(knots: readonly Knot[], x: number): [Knot, Knot] | undefined {
  const last = knots.length - 1;
  if (!(x >= (knots[0]?.x ?? Number.NaN) && x <= (knots[last]?.x ?? Number.NaN))) return undefined;
  let low = 0;
  let high = last;
  while (high - low > 1) {
    const middle = (low + high) >> 1;
    if ((knots[middle]?.x ?? Number.NaN) <= x) low = middle;
    else high = middle;
  }
  const a = knots[low];
  const b = knots[high];
  return a && b ? [a, b] : undefined;
}

const at = (values: readonly number[], i: number): number => values[i] ?? Number.NaN;

function withSlopes(points: readonly { x: number; y: number }[]): Knot[] {
  const widths: number[] = [];
  const chords: number[] = [];
  points.forEach((point, i) => {
    if (!Number.isFinite(point.x) || !Number.isFinite(point.y))
      throw new RangeError("a point of the curve isn't finite");
    const next = points[i + 1];
    if (next === undefined) return;
    if (next.x === point.x) throw new RangeError("two points of the curve have the same x");
    widths.push(next.x - point.x);
    chords.push((next.y - point.y) / (next.x - point.x));
  });
  const last = chords.length - 1;
  return points.map(({ x, y }, i) => {
    if (last === 0) return { x, y, d: at(chords, 0) };
    if (i === 0) return { x, y, d: endSlope(at(widths, 0), at(widths, 1), at(chords, 0), at(chords, 1)) };
    if (i === points.length - 1)
      return { x, y, d: endSlope(at(widths, last), at(widths, last - 1), at(chords, last), at(chords, last - 1)) };
    if (!(at(chords, i - 1) * at(chords, i) > 0)) return { x, y, d: 0 };
    const w1 = 2 * at(widths, i) + at(widths, i - 1);
    const w2 = at(widths, i) + 2 * at(widths, i - 1);
    return { x, y, d: (w1 + w2) / (w1 / at(chords, i - 1) + w2 / at(chords, i)) };
  });
}

/** Three-point slope at an end, held so that the end segment stays monotone. */
function endSlope(h0: number, h1: number, m0: number, m1: number): number {
  const d = ((2 * h0 + h1) * m0 - h0 * m1) / (h0 + h1);
  if (Math.sign(d) !== Math.sign(m0)) return 0;
  return Math.sign(m0) !== Math.sign(m1) && Math.abs(d) > 3 * Math.abs(m0) ? 3 * m0 : d;
}

function cubic(a: Knot, b: Knot, x: number): number {
  if (x === a.x) return a.y;
  if (x === b.x) return b.y;
  const h = b.x - a.x;
  const s = (x - a.x) / h;
  const chord = (b.y - a.y) / h;
  const c = 3 * chord - 2 * a.d - b.d;
  const e = a.d + b.d - 2 * chord;
  return a.y + s * h * (a.d + s * (c + s * e));
}

function cubicSlope(a: Knot, b: Knot, x: number): number {
  const h = b.x - a.x;
  const s = (x - a.x) / h;
  const chord = (b.y - a.y) / h;
  return a.d + s * (2 * (3 * chord - 2 * a.d - b.d) + 3 * s * (a.d + b.d - 2 * chord));
}

/** Root on the same cubic, so that value(inverse(y)) gives y back; a flat piece at y has no one answer. */
function inverse(knots: readonly Knot[], y: number): number | undefined {
  let found: number | undefined;
  for (let i = 0; i + 1 < knots.length; i++) {
    const a = knots[i];
    const b = knots[i + 1];
    if (!a || !b || !(y >= Math.min(a.y, b.y) && y <= Math.max(a.y, b.y))) continue;
    if (a.y === b.y) return undefined;
    const root = rootIn(a, b, y);
    if (found !== undefined && found !== root) return undefined;
    found = root;
  }
  return found;
}

/** Bisection held by the segment with Newton's steps where they stay inside. */
function rootIn(a: Knot, b: Knot, y: number): number {
  if (y === a.y) return a.x;
  if (y === b.y) return b.x;
  const rising = b.y > a.y;
  let low = a.x;
  let high = b.x;
  let x = a.x + ((b.x - a.x) * (y - a.y)) / (b.y - a.y);
  for (let n = 0; n < 200; n++) {
    const off = cubic(a, b, x) - y;
    if (off === 0) return x;
    if (off < 0 === rising) low = x;
    else high = x;
    const newton = x - off / cubicSlope(a, b, x);
    const next = newton > low && newton < high ? newton : low + (high - low) / 2;
    if (next === x || Math.abs(next - x) <= 1e-16 * Math.abs(x)) return next;
    x = next;
  }
  return x;
}
