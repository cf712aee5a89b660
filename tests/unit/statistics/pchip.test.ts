import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { pchip } from "@/lib/science/statistics/pchip";

const falling = fc
  .array(
    fc.record({ dx: fc.double({ min: 0.1, max: 9, noNaN: true }), dy: fc.double({ min: 0.01, max: 9, noNaN: true }) }),
    {
      minLength: 2,
      maxLength: 9,
    },
  )
  .map((steps) => {
    let x = 20;
    let y = 90;
    return steps.map(({ dx, dy }) => ({ x: (x += dx), y: (y -= dy) }));
  });

describe("monotone curve", () => {
  it("never rises between falling points, and gives every point back", () => {
    fc.assert(
      fc.property(falling, (points) => {
        const curve = pchip(points);
        for (const { x, y } of points) expect(curve.value(x)).toBe(y);
        const span = curve.xMax - curve.xMin;
        let last = Infinity;
        for (let i = 0; i <= 60; i++) {
          const y = curve.value(Math.min(curve.xMax, curve.xMin + (span * i) / 60)) ?? NaN;
          expect(y).toBeLessThanOrEqual(last + 1e-9);
          last = y;
        }
      }),
    );
  });
  it("reads back the x of a y", () => {
    fc.assert(
      fc.property(falling, fc.double({ min: 0, max: 1, noNaN: true }), (points, share) => {
        const curve = pchip(points);
        const high = curve.value(curve.xMin) ?? NaN;
        const low = curve.value(curve.xMax) ?? NaN;
        const y = Math.max(low, low + (high - low) * share);
        const x = curve.inverse(y);
        expect(x).toBeDefined();
        expect(curve.value(x ?? NaN)).toBeCloseTo(y, 8);
      }),
    );
  });
  it("says nothing outside the measured range", () => {
    const curve = pchip([
      { x: 30, y: 50 },
      { x: 40, y: 42 },
    ]);
    expect(curve.value(29.999)).toBeUndefined();
    expect(curve.slope(40.001)).toBeUndefined();
    expect(curve.value(NaN)).toBeUndefined();
    expect(curve.inverse(50.1)).toBeUndefined();
    expect(curve.value(35)).toBe(46);
  });
  it("has no one x where the curve is flat or comes by twice", () => {
    const bent = pchip([
      { x: 0, y: 0 },
      { x: 1, y: 2 },
      { x: 2, y: 1 },
      { x: 3, y: 1 },
      { x: 4, y: 5 },
    ]);
    expect(bent.inverse(1.5)).toBeUndefined();
    expect(bent.inverse(1)).toBeUndefined();
    expect(bent.inverse(4)).toBeGreaterThan(3);
  });
  it("refuses one point, equal x and numbers that aren't finite", () => {
    expect(() => pchip([{ x: 1, y: 1 }])).toThrow(RangeError);
    expect(() =>
      pchip([
        { x: 1, y: 1 },
        { x: 1, y: 2 },
      ]),
    ).toThrow(RangeError);
    expect(() =>
      pchip([
        { x: 1, y: NaN },
        { x: 2, y: 2 },
      ]),
    ).toThrow(RangeError);
  });
});
