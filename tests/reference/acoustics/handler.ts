import { num, nums } from "../support/vectors";

type Loose = Record<string, unknown>;

/** Inputs of a check value, read by name; a missing or mistyped one fails the test. */
export class Inputs {
  constructor(private readonly values: Loose) {}

  n(name: string): number {
    return num(this.values[name]);
  }

  optional(name: string): number | undefined {
    return this.values[name] === undefined ? undefined : this.n(name);
  }

  list(name: string): number[] {
    return nums(this.values[name]);
  }

  get(name: string): unknown {
    return this.values[name];
  }

  text(name: string): string {
    const value = this.values[name];
    if (typeof value !== "string") throw new Error(`${name} is no text`);
    return value;
  }
}

/** What our code gives for a check value, in the shape and under the names of its `expected`. */
export type Handler = (inputs: Inputs) => unknown;
export type Handlers = Record<string, Handler>;

/** The generator that the check values' noise comes from (mulberry32, public domain). */
export function mulberry32(seed: number): () => number {
  let a = seed >>> 0;
  return () => {
    a = (a + 0x6d2b79f5) | 0;
    let t = a;
    t = Math.imul(t ^ (t >>> 15), t | 1);
    t ^= t + Math.imul(t ^ (t >>> 7), t | 61);
    return ((t ^ (t >>> 14)) >>> 0) / 4294967296;
  };
}

/** White noise 2u − 1. */
export function whiteNoise(seed: number, length: number): Float64Array {
  const next = mulberry32(seed);
  return Float64Array.from({ length }, () => 2 * next() - 1);
}
