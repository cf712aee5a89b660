import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { lineObstacles, placeLabels, type Box } from "@/components/charts/label-places";

const area = { x: 0, y: 0, w: 600, h: 400 };
const meet = (a: Box, b: Box) => a.x < b.x + b.w && b.x < a.x + a.w && a.y < b.y + b.h && b.y < a.y + a.h;

// Hand-derived geometry; the rule "labelled at their end, clear of marks" is the house's own.
describe("placeLabels", () => {
  it("puts a lone label right of its mark", () => {
    const [place] = placeLabels([{ w: 80, h: 14, at: { x: 300, y: 200 } }], [], area);
    expect(place).toMatchObject({ x: 310, y: 193, tied: false });
  });

  it("keeps two labels of one spot apart", () => {
    const at = { x: 300, y: 200 };
    const [first, second] = placeLabels(
      [
        { w: 80, h: 14, at },
        { w: 80, h: 14, at },
      ],
      [],
      area,
    );
    expect(first && second && meet(first, second)).toBe(false);
  });

  it("goes left of a mark at the right edge rather than out of the picture", () => {
    const [place] = placeLabels([{ w: 80, h: 14, at: { x: 595, y: 200 } }], [], area);
    expect(place && place.x + place.w).toBeLessThanOrEqual(600);
  });

  it("keeps off the figures under the axis on a phone, however many curves end in the lowest corner", () => {
    const phone = { x: 44, y: 0, w: 292, h: 266 };
    const ends = [
      { x: 278, y: 214 },
      { x: 284, y: 247 },
      { x: 292, y: 250 },
      { x: 294, y: 251 },
    ];
    const obstacles = ends.flatMap(({ x, y }, n) => [
      { x: x - 14, y: y - 7, w: 28, h: 14 },
      ...lineObstacles([
        { x: 80 + 3 * n, y: n === 0 ? 40 : 90 },
        { x: 180, y: n === 0 ? 145 : 178 },
        { x, y },
      ]),
    ]);
    const wishes = ends.map((at, n) => ({ w: [62, 92, 85, 108][n] ?? 0, h: 14, at }));
    for (const place of placeLabels(wishes, obstacles, phone))
      expect(place.y + place.h).toBeLessThanOrEqual(phone.y + phone.h);
  });

  it("ties a label to its mark by a line when everything near is taken", () => {
    const wall = { x: 150, y: 165, w: 300, h: 70 };
    const [place] = placeLabels([{ w: 80, h: 14, at: { x: 300, y: 200 } }], [wall], area);
    expect(place?.tied).toBe(true);
    expect(place && meet(place, wall)).toBe(false);
  });

  it("gives one place for each label, whatever stands in the way", () => {
    const box = fc.record({
      x: fc.integer({ min: 0, max: 600 }),
      y: fc.integer({ min: 0, max: 400 }),
      w: fc.integer({ min: 1, max: 200 }),
      h: fc.integer({ min: 1, max: 200 }),
    });
    fc.assert(
      fc.property(fc.array(box, { maxLength: 30 }), fc.integer({ min: 0, max: 5 }), (obstacles, count) => {
        const wishes = Array.from({ length: count }, (_, n) => ({ w: 60, h: 14, at: { x: n * 100, y: n * 70 } }));
        expect(placeLabels(wishes, obstacles, area)).toHaveLength(count);
      }),
    );
  });
});

describe("lineObstacles", () => {
  it("covers a line from end to end in steps", () => {
    const boxes = lineObstacles([
      { x: 0, y: 0 },
      { x: 60, y: 0 },
    ]);
    expect(boxes).toHaveLength(10);
    expect(boxes[0]).toEqual({ x: -2, y: -2, w: 4, h: 4 });
    expect(lineObstacles([])).toEqual([]);
  });
});
