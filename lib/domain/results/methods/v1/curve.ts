import { pchip, type Pchip } from "@/lib/science/statistics/pchip";
import { METHOD_V1 } from "./parameters";

/** A knot of a curve: the mean of the points (by index in the list given) that lie closer than the merging step. */
export type CurveKnot = { readonly x: number; readonly y: number; readonly members: readonly number[] };

/**
 * Points as knots: sorted by x, and neighbours closer than `METHOD_V1.mergeWithinDb` in x (compared after rounding to
 * 1e-9) made one, with the mean of both coordinates; of three in a row each within the step of the next, all three.
 * @param xs x of each point, dB @param ys y of each point; same length
 */
export function curveKnots(xs: readonly number[], ys: readonly number[]): CurveKnot[] {
  const order = xs.map((_, i) => i).sort((a, b) => (xs[a] ?? 0) - (xs[b] ?? 0) || a - b);
  const groups: number[][] = [];
  let before: number | undefined;
  for (const i of order) {
    const x = xs[i] ?? Number.NaN;
    const near = before !== undefined && Math.round((x - before) * 1e9) / 1e9 < METHOD_V1.mergeWithinDb;
    const last = groups[groups.length - 1];
    if (near && last) last.push(i);
    else groups.push([i]);
    before = x;
  }
  return groups.map((members) => ({ x: meanOf(xs, members), y: meanOf(ys, members), members }));
}

function meanOf(values: readonly number[], members: readonly number[]): number {
  return members.reduce((sum, i) => sum + (values[i] ?? Number.NaN), 0) / members.length;
}

/** The curve through knots, or undefined for fewer than two: one level alone is no curve. */
export function curveThrough(knots: readonly { readonly x: number; readonly y: number }[]): Pchip | undefined {
  return knots.length < METHOD_V1.curvePointsMin ? undefined : pchip(knots);
}

/**
 * A curve's y at x, going on straight with the end's slope outside. Only for sensitivities and simulated draws, where
 * the range itself is moved by error; a figure is never read outside the range.
 */
export function valueWithStraightEnds(curve: Pchip, x: number): number {
  const inside = curve.value(x);
  if (inside !== undefined) return inside;
  const end = x < curve.xMin ? curve.xMin : curve.xMax;
  return (curve.value(end) ?? Number.NaN) + (curve.slope(end) ?? Number.NaN) * (x - end);
}

export type KnotSensitivity = { readonly byX: number; readonly byY: number };

/**
 * ∂y/∂x_k and ∂y/∂y_k of the curve's y at x for each knot, by central differences on the whole curve (so slopes that
 * hang on neighbours are in). At a knot this is 1 for its own y and −slope for its own x: u² = u_T² + slope²·u_L².
 */
export function knotSensitivities(knots: readonly CurveKnot[], x: number): KnotSensitivity[] {
  const read = (k: number, dx: number, dy: number): number => {
    const moved = knots.map((knot, i) => (i === k ? { x: knot.x + dx, y: knot.y + dy } : knot));
    return valueWithStraightEnds(pchip(moved), x);
  };
  return knots.map((knot, k) => {
    const stepX = METHOD_V1.sensitivityStep;
    const stepY = METHOD_V1.sensitivityStep * Math.max(Math.abs(knot.y), 1e-6);
    return {
      byX: (read(k, stepX, 0) - read(k, -stepX, 0)) / (2 * stepX),
      byY: (read(k, 0, stepY) - read(k, 0, -stepY)) / (2 * stepY),
    };
  });
}

const SAME_LEVEL_DB = 1e-9;

/** x itself, or the end of the curve that it is equal to within 1e-9; undefined outside. Ends count as inside. */
export function insideRange(curve: Pchip, x: number): number | undefined {
  const held = Math.min(Math.max(x, curve.xMin), curve.xMax);
  return Math.abs(held - x) <= SAME_LEVEL_DB ? held : undefined;
}

/** The knots between which x lies; only the one knot where x is there within 1e-9; empty outside. */
export function knotsAround(knots: readonly CurveKnot[], x: number): CurveKnot[] {
  const exact = knots.find((knot) => Math.abs(knot.x - x) <= SAME_LEVEL_DB);
  if (exact) return [exact];
  const above = knots.findIndex((knot) => knot.x > x);
  return above <= 0 ? [] : knots.slice(above - 1, above + 1);
}
