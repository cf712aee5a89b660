import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { compactLetters } from "@/lib/science/statistics/letters";
import { benjaminiHochberg, holm } from "@/lib/science/statistics/multiple-comparisons";
import { probabilityFirst, probabilityLess, simulateRanks } from "@/lib/science/statistics/ranking";
import { createRandom } from "@/lib/science/statistics/random";

const probability = fc.double({ min: 0, max: 1, noNaN: true });

describe("adjusted p-values", () => {
  it("never fall below the raw ones, BH never above Holm, and keep the order", () => {
    fc.assert(
      fc.property(fc.array(probability, { maxLength: 20 }), (p) => {
        const [strict, mild] = [holm(p), benjaminiHochberg(p)];
        p.forEach((raw, i) => {
          expect(strict[i]).toBeGreaterThanOrEqual(raw);
          expect(mild[i]).toBeGreaterThanOrEqual(raw);
          expect(mild[i]).toBeLessThanOrEqual((strict[i] ?? NaN) * (1 + 1e-14));
          p.forEach((other, j) => {
            if (raw < other) expect(strict[i]).toBeLessThanOrEqual(strict[j] ?? NaN);
          });
        });
      }),
    );
  });
  it("refuse what isn't a probability", () => {
    expect(() => holm([0.1, NaN])).toThrow(RangeError);
    expect(() => benjaminiHochberg([1.2])).toThrow(RangeError);
  });
});

describe("letters", () => {
  it("are shared exactly by those that aren't told apart", () => {
    const matrix = fc
      .integer({ min: 1, max: 9 })
      .chain((n) =>
        fc.record({ n: fc.constant(n), bits: fc.array(fc.boolean(), { minLength: n * n, maxLength: n * n }) }),
      );
    fc.assert(
      fc.property(matrix, ({ n, bits }) => {
        const differ = (i: number, j: number) => bits[i * n + j] ?? false;
        const letters = compactLetters(n, differ);
        for (let i = 0; i < n; i++) {
          expect(letters[i]).not.toBe("");
          for (let j = i + 1; j < n; j++) {
            const shared = [...(letters[i] ?? "")].some((letter) => letters[j]?.includes(letter));
            expect(shared).toBe(!differ(i, j));
          }
        }
      }),
    );
  });
  it("are one for all when none differ, and one each when all do", () => {
    expect(compactLetters(3, () => false)).toEqual(["a", "a", "a"]);
    expect(compactLetters(3, () => true)).toEqual(["a", "b", "c"]);
    expect(compactLetters(0, () => true)).toEqual([]);
  });
});

describe("probability of being first", () => {
  const figure = fc.record({
    value: fc.double({ min: 30, max: 40, noNaN: true }),
    u: fc.double({ min: 0.05, max: 2, noNaN: true }),
  });
  it("adds up to one, and for two is P(A < B)", () => {
    fc.assert(
      fc.property(fc.array(figure, { minLength: 2, maxLength: 8 }), (figures) => {
        const total = probabilityFirst(figures).reduce((a, b) => a + b, 0);
        expect(total).toBeCloseTo(1, 8);
        const [a, b] = figures;
        if (a && b) expect(probabilityFirst([a, b])[0]).toBeCloseTo(probabilityLess(a, b), 8);
      }),
      { numRuns: 40 },
    );
  });
  it("refuses a figure without uncertainty", () => {
    expect(() => probabilityFirst([{ value: 1, u: 0 }])).toThrow(RangeError);
  });
});

describe("simulated ranks", () => {
  it("keep order, range and shares together", () => {
    const random = createRandom(3);
    const ranks = simulateRanks(4, 4000, (values) => {
      for (let i = 0; i < 4; i++) values[i] = i + random.normal();
    });
    for (const { counts, low, high } of ranks) {
      expect(counts.reduce((a, b) => a + b, 0)).toBe(4000);
      expect(low).toBeLessThanOrEqual(high);
    }
    expect(ranks.reduce((total, { pFirst }) => total + pFirst, 0)).toBeCloseTo(1, 12);
    expect(ranks[0]?.pFirst).toBeGreaterThan(ranks[1]?.pFirst ?? NaN);
  });
  it("take the 2.5 and 97.5 % points from the cumulated counts", () => {
    let n = 0;
    const [first] = simulateRanks(2, 40, (values) => {
      values[0] = n < 1 ? 2 : 0;
      values[1] = 1;
      n += 1;
    });
    // 1 of 40 draws is exactly 2.5 %: the upper point is reached at rank 1 with 39 of 40 = 97.5 %.
    expect(first).toMatchObject({ low: 1, high: 1, pFirst: 39 / 40 });
  });
});
