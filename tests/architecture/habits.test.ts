import { mkdirSync, rmSync, writeFileSync } from "node:fs";
import path from "node:path";
import { afterEach, expect, test } from "vitest";
import { temporaryFolder } from "../setup/temporary-folder";
import { barrelFiles, environmentBreaches, lengths, purityBreaches } from "./habits";

const root = path.resolve(import.meta.dirname, "../..");

let planted: string | undefined;
afterEach(() => planted && rmSync(planted, { recursive: true, force: true }));

function plant(name: string, content: string): string {
  planted = temporaryFolder("planted");
  mkdirSync(path.dirname(path.join(planted, name)), { recursive: true });
  writeFileSync(path.join(planted, name), content);
  return planted;
}

test("process.env is read by the settings alone", () => {
  expect(environmentBreaches(root)).toEqual([]);
});

test.each(["process.env.PORT", 'process["env"]', "const { env } = { env: process.env }"])(
  "reading it by %s elsewhere is found",
  (line) => {
    expect(environmentBreaches(plant("lib/server/x.ts", line))).toEqual(["lib/server/x.ts:1: reads process.env"]);
  },
);

test("science and domain know no clock, chance, environment or package", () => {
  expect(purityBreaches(root)).toEqual([]);
});

test.each([
  "export const now = Date.now();",
  "export const now = new Date();",
  "export const chance = Math.random();",
  "export const tick = performance.now();",
  "export const id = crypto.randomUUID();",
  `import { readFileSync } from "node:fs";`,
  `import { z } from "zod";`,
  `import type { ReactNode } from "react";`,
])("an impure line is found: %s", (line) => {
  expect(purityBreaches(plant("lib/science/acoustics/x.ts", line))).toHaveLength(1);
});

test("a date made from an argument is pure", () => {
  expect(purityBreaches(plant("lib/domain/x.ts", "export const day = (at: number) => new Date(at);"))).toEqual([]);
});

test("no file but data is longer than 300 lines", () => {
  expect(lengths(root).filter((each) => each.lines > 300)).toEqual([]);
  expect(lengths(plant("lib/server/x.ts", "a;\n".repeat(301)))).toEqual([{ file: "lib/server/x.ts", lines: 301 }]);
});

test("the median file has about 70 lines and nine in ten have under 200", () => {
  const all = lengths(root).map((each) => each.lines);
  expect(all[Math.floor(all.length / 2)]).toBeLessThanOrEqual(80);
  expect(all[Math.floor(all.length * 0.9)]).toBeLessThan(200);
});

test("no file only passes others on", () => {
  expect(barrelFiles(root)).toEqual([]);
});
