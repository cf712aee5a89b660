import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { curveKnots, curveThrough, valueWithStraightEnds } from "@/lib/domain/results/methods/v1/curve";
import { drawReader } from "@/lib/domain/scoring/draw-curve";

describe("the curve reader of simulated rounds", () => {
  it("reads what the figures' own curve reads, through any points, also merged, out of order and beyond the ends", () => {
    const point = fc.record({
      x: fc.double({ min: 20, max: 60, noNaN: true }).map((x) => Math.round(x * 20) / 20),
      y: fc.double({ min: 0.1, max: 1, noNaN: true }),
    });
    fc.assert(
      fc.property(fc.array(point, { minLength: 1, maxLength: 8 }), (points) => {
        const levels = [18, 25, 30, 35.5, 41, 62];
        const xs = points.map(({ x }) => x);
        const ys = points.map(({ y }) => y);
        const knots = curveKnots(xs, ys);
        const curve = curveThrough(knots);
        const out = new Float64Array(levels.length);
        drawReader(levels)(Float64Array.from(xs), Float64Array.from(ys), points.length, out);
        levels.forEach((level, i) => {
          const expected = curve ? valueWithStraightEnds(curve, level) : (knots[0]?.y ?? Number.NaN);
          expect(Math.abs((out[i] ?? Number.NaN) - expected)).toBeLessThan(1e-9 * Math.max(1, Math.abs(expected)));
        });
      }),
      { seed: 4, numRuns: 500 },
    );
  });
});
