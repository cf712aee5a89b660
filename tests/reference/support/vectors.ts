import { expect } from "vitest";
import vectors from "../values/metrology.json";

type Loose = Record<string, unknown>;

/** One check value: what goes in, what comes out, how close, and where it is from. */
export interface Vector {
  readonly id: string;
  readonly title: string;
  readonly inputs: Loose;
  readonly expected: Loose;
  readonly tolerance: Loose;
}

const all = vectors as unknown as {
  id: string;
  topic: string;
  source: string;
  fromMemory: boolean;
  inputs: Loose;
  expected: Loose;
  tolerance: Loose;
}[];

/** The vector with this id; its title carries the source, and says so when the value is from memory. */
export function vector(id: string): Vector {
  const found = all.find((entry) => entry.id === id);
  if (!found) throw new Error(`no check value ${id}`);
  const memory = found.fromMemory ? "; value from memory" : "";
  return { ...found, title: `${id} ${found.topic} (${found.source}${memory})` };
}

/** Ids that start with a section's prefix ("T3-"). */
export function idsOf(prefix: string): string[] {
  return all.filter((entry) => entry.id.startsWith(prefix)).map((entry) => entry.id);
}

export function num(value: unknown): number {
  if (typeof value !== "number") throw new Error(`not a number: ${JSON.stringify(value)}`);
  return value;
}

export function nums(value: unknown): number[] {
  if (!Array.isArray(value)) throw new Error(`not a list: ${JSON.stringify(value)}`);
  return value.map(num);
}

export function rows(value: unknown): number[][] {
  if (!Array.isArray(value)) throw new Error(`not a list: ${JSON.stringify(value)}`);
  return value.map(nums);
}

export function record(value: unknown): Loose {
  if (typeof value !== "object" || value === null || Array.isArray(value)) throw new Error("not a record");
  return value as Loose;
}

/** Whether every number of `actual` lies within the vector's tolerance of `expected` (same shape, text equal). */
export function expectClose(actual: unknown, expected: unknown, tolerance: Loose): void {
  if (typeof expected === "number") {
    const allowed = tolerance.exact === true ? 0 : num(tolerance.abs ?? num(tolerance.rel ?? 0) * Math.abs(expected));
    // Printed check values carry twelve digits, so half a unit of the last one is always open.
    const printed = tolerance.exact === true ? 0 : Math.abs(expected) * 1e-11;
    expect(Math.abs(num(actual) - expected), `${num(actual)} against ${expected}`).toBeLessThanOrEqual(
      Math.max(allowed, printed),
    );
    return;
  }
  if (Array.isArray(expected)) {
    expect(Array.isArray(actual) && actual.length).toBe(expected.length);
    expected.forEach((value, i) => expectClose((actual as unknown[])[i], value, tolerance));
    return;
  }
  if (typeof expected === "object" && expected !== null) {
    for (const [key, value] of Object.entries(expected)) expectClose(record(actual)[key], value, tolerance);
    return;
  }
  expect(actual).toEqual(expected);
}
