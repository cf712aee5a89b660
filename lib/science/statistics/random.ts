/**
 * A documented generator for simulated ranks and bootstraps: the same seed gives the same draws everywhere.
 *
 * Generator: xoshiro128** 1.1 (D. Blackman, S. Vigna, ACM Trans. Math. Softw. 47 (2021) 36), four 32-bit words of
 * state. Seeding: two outputs of SplitMix64 started at the seed (G. Steele, D. Lea, C. Flood, OOPSLA 2014), each split
 * into two words, low word first. uniform(): two words, (52 high bits + 0.5) / 2^52, so never 0 nor 1: first word gives
 * the 26 high bits, second the 26 low ones. normal(): Box and Muller (Ann. Math. Stat. 29 (1958) 610), from u1 then u2:
 * √(−2 ln u1)·cos 2πu2 is handed out first, the sine twin at the next call.
 */
export interface Random {
  /** Next 32-bit word, 0..2^32 − 1. */
  word(): number;
  /** Uniform on the open interval (0, 1). Takes two words. */
  uniform(): number;
  /** Standard normal. Takes two uniforms at every odd call, none at every even one. */
  normal(): number;
  /** Whole number 0..count − 1, each as likely (words beyond the last full multiple are drawn again). */
  below(count: number): number;
}

/** The state of the generator; it is changed in place by `nextWord`. */
export type RandomState = [number, number, number, number];

/** State from a seed: a whole number 0..2^53 − 1. @throws RangeError otherwise. */
export function seedState(seed: number): RandomState {
  if (!Number.isSafeInteger(seed) || seed < 0) throw new RangeError("a seed is a whole number from 0 to 2^53 − 1");
  const [first, second] = splitMix64(BigInt(seed), 2);
  const words = (value: bigint) => [Number(value & 0xffffffffn), Number(value >> 32n)] as const;
  const [a, b] = words(first ?? 0n);
  const [c, d] = words(second ?? 0n);
  return [a, b, c, d];
}

/** The first `count` outputs of SplitMix64 from a 64-bit seed. */
export function splitMix64(seed: bigint, count: number): bigint[] {
  const cut = (value: bigint) => BigInt.asUintN(64, value);
  let state = cut(seed);
  return Array.from({ length: count }, () => {
    state = cut(state + 0x9e3779b97f4a7c15n);
    let z = state;
    z = cut((z ^ (z >> 30n)) * 0xbf58476d1ce4e5b9n);
    z = cut((z ^ (z >> 27n)) * 0x94d049bb133111ebn);
    return z ^ (z >> 31n);
  });
}

/** One step of xoshiro128**: a word 0..2^32 − 1; the state moves on. */
export function nextWord(state: RandomState): number {
  const turned = Math.imul(state[1], 5);
  const result = Math.imul((turned << 7) | (turned >>> 25), 9) >>> 0;
  const shifted = state[1] << 9;
  state[2] ^= state[0];
  state[3] ^= state[1];
  state[1] ^= state[2];
  state[0] ^= state[3];
  state[2] ^= shifted;
  state[3] = (state[3] << 11) | (state[3] >>> 21);
  return result;
}

/** A stream of draws from a seed (whole number 0..2^53 − 1). @throws RangeError for another seed. */
export function createRandom(seed: number): Random {
  const state = seedState(seed);
  let spare: number | undefined;
  const word = () => nextWord(state);
  const uniform = () => ((word() >>> 6) * 0x4000000 + (word() >>> 6) + 0.5) / 0x10000000000000;
  const normal = () => {
    if (spare !== undefined) {
      const twin = spare;
      spare = undefined;
      return twin;
    }
    const radius = Math.sqrt(-2 * Math.log(uniform()));
    const angle = 2 * Math.PI * uniform();
    spare = radius * Math.sin(angle);
    return radius * Math.cos(angle);
  };
  const below = (count: number) => {
    if (!Number.isInteger(count) || count < 1 || count > 0x100000000) throw new RangeError("below() needs 1..2^32");
    const limit = 0x100000000 - (0x100000000 % count);
    let drawn = word();
    while (drawn >= limit) drawn = word();
    return drawn % count;
  };
  return { word, uniform, normal, below };
}
