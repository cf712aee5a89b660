import { describe, expect, it } from "vitest";
import { createRandom, nextWord, seedState, splitMix64, type RandomState } from "@/lib/science/statistics/random";

describe("generator", () => {
  it("gives the published words of xoshiro128** from state 1, 2, 3, 4 (rand_xoshiro crate's reference vector)", () => {
    const state: RandomState = [1, 2, 3, 4];
    const words = Array.from({ length: 10 }, () => nextWord(state));
    expect(words).toEqual([
      11520, 0, 5927040, 70819200, 2031721883, 1637235492, 1287239034, 3734860849, 3729100597, 4258142804,
    ]);
  });
  it("gives the published words of SplitMix64 (Vigna's splitmix64.c, by the rand_xoshiro crate's test)", () => {
    expect(splitMix64(1477776061723855037n, 3)).toEqual([
      1985237415132408290n,
      2979275885539914483n,
      13511426838097143398n,
    ]);
  });
  it("seeds the four words low first from two SplitMix64 outputs", () => {
    const [first, second] = splitMix64(7n, 2);
    const [a, b, c, d] = seedState(7);
    expect(BigInt(a) + (BigInt(b) << 32n)).toBe(first);
    expect(BigInt(c) + (BigInt(d) << 32n)).toBe(second);
  });
  it("draws in the documented order: two words a uniform, two uniforms a pair of normals, cosine first", () => {
    const words = createRandom(5);
    const uniform = () => {
      const high = words.word() >>> 6;
      return (high * 2 ** 26 + (words.word() >>> 6) + 0.5) / 2 ** 52;
    };
    const draws = createRandom(5);
    const [u1, u2] = [uniform(), uniform()];
    const radius = Math.sqrt(-2 * Math.log(u1));
    expect(draws.normal()).toBe(radius * Math.cos(2 * Math.PI * u2));
    expect(draws.normal()).toBe(radius * Math.sin(2 * Math.PI * u2));
    expect(draws.uniform()).toBe(uniform());
  });
  it("has the normal's first four moments over 100,000 draws (bounds are five standard errors)", () => {
    const random = createRandom(1);
    const n = 100_000;
    const moments = [0, 0, 0, 0];
    for (let i = 0; i < n; i++) {
      const z = random.normal();
      for (let k = 0; k < 4; k++) moments[k] = (moments[k] ?? 0) + z ** (k + 1) / n;
    }
    // Variances of z, z², z³, z⁴ are 1, 2, 15, 96.
    [0, 1, 0, 3].forEach((expected, k) =>
      expect(Math.abs((moments[k] ?? NaN) - expected)).toBeLessThan(5 * Math.sqrt(([1, 2, 15, 96][k] ?? 0) / n)),
    );
  });
  it("refuses a seed that isn't a whole number from 0", () => {
    for (const seed of [-1, 0.5, NaN, 2 ** 53]) expect(() => createRandom(seed)).toThrow(RangeError);
  });
});
