import { mkdirSync, rmSync, writeFileSync } from "node:fs";
import path from "node:path";
import { afterEach, beforeEach, expect, test } from "vitest";
import { temporaryFolder } from "../setup/temporary-folder";
import { importBreaches } from "./check-imports";

const root = path.resolve(import.meta.dirname, "../..");

test("every import of the tree is one that the allow-list has, and every file stands in a layer", () => {
  expect(importBreaches(root)).toEqual([]);
});

let planted: string;
beforeEach(() => {
  planted = temporaryFolder("planted");
});
afterEach(() => rmSync(planted, { recursive: true, force: true }));

function plant(files: Record<string, string>): string[] {
  for (const [name, content] of Object.entries(files)) {
    mkdirSync(path.dirname(path.join(planted, name)), { recursive: true });
    writeFileSync(path.join(planted, name), content);
  }
  return importBreaches(planted);
}

const targets = {
  "lib/server/use-case.ts": "export const a = 1;",
  "lib/science/sum.ts": "export const b = 1;",
  "db/client/connect.ts": "export type Handle = number;",
};

test.each([
  ["a static import", `import { a } from "@/lib/server/use-case";`],
  ["an import of a type", `import type { a } from "@/lib/server/use-case";`],
  ["a type named inline", `export type A = import("@/lib/server/use-case").A;`],
  ["a re-export", `export { a } from "@/lib/server/use-case";`],
  ["a re-export of all", `export * from "@/lib/server/use-case";`],
  ["a dynamic import", `export const later = () => import("@/lib/server/use-case");`],
  ["a relative path", `import { a } from "../server/use-case";`],
  ["a side effect", `import "@/lib/server/use-case";`],
  ["a require", `const a = require("../server/use-case"); export { a };`],
])("a breach by %s is found", (_how, line) => {
  expect(plant({ ...targets, "lib/domain/results.ts": line })).toEqual([
    expect.stringMatching(/^lib\/domain\/results\.ts:1: domain imports server/),
  ]);
});

test.each([
  ["a page that reads the database", "app/page.tsx", `import "@/db/client/connect";`, "app imports db"],
  ["a use-case that knows the session", "lib/server/x.ts", `import "@/lib/auth/actor";`, "server imports auth"],
  ["a later domain folder", "lib/domain/bench/x.ts", `import "../scoring/y";`, "domain/bench imports domain/scoring"],
  ["another feature", "components/fit/x.tsx", `import "../sheet/y";`, "components/fit imports components/sheet"],
  ["a program that imports a page", "lib/cli/x.ts", `import "@/app/page";`, "cli imports app"],
  ["a product file that imports a test", "lib/cli/x.ts", `import "@/tests/setup/z";`, "a test"],
  ["knex outside the database", "lib/server/x.ts", `import type { Knex } from "knex";`, "imports knex"],
  ["the search client elsewhere", "lib/server/x.ts", `import "meilisearch/token";`, "imports meilisearch"],
])("%s is found", (_what, file, line, breach) => {
  const found = plant({
    ...targets,
    "lib/auth/actor.ts": "export {};",
    "lib/domain/scoring/y.ts": "export {};",
    "components/sheet/y.tsx": "export {};",
    "app/page.tsx": "export {};",
    [file]: line,
  });
  expect(found).toEqual([expect.stringContaining(breach)]);
});

test("a file in no layer is found, and what the list allows is let through", () => {
  expect(plant({ "helpers/x.ts": "export {};" })).toEqual(["helpers/x.ts: stands in no layer"]);
  rmSync(path.join(planted, "helpers"), { recursive: true });
  expect(
    plant({
      ...targets,
      "lib/domain/results/x.ts": `import "@/lib/science/sum"; import "../bench/y"; import "node:path";`,
      "lib/domain/bench/y.ts": "export {};",
      "app/page.tsx": `import "@/lib/server/use-case"; import "react";`,
    }),
  ).toEqual([]);
});
