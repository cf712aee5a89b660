import { afterEach, beforeEach, expect, vi } from "vitest";

/** A warning that nobody reads is a fault that nobody sees: console.error and console.warn fail the test that caused them. */
const said: string[] = [];

beforeEach(() => {
  said.length = 0;
  for (const level of ["error", "warn"] as const) {
    vi.spyOn(console, level).mockImplementation((...words: unknown[]) => {
      said.push(`console.${level}: ${words.map(String).join(" ")}`);
    });
  }
});

afterEach(() => {
  // A test that means to provoke one replaces the spy by its own and looks at that.
  expect(said.splice(0), "nothing is written to console.error or console.warn").toEqual([]);
});
