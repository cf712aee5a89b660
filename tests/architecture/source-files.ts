import { readdirSync, readFileSync } from "node:fs";
import path from "node:path";

const skipped = new Set(["node_modules", ".next", "data", ".git", "coverage", "public"]);
const source = /\.(ts|tsx|mjs|mts|js|jsx)$/;

/** All source files under a root, by their path from it with forward slashes, sorted. */
export function sourceFiles(root: string): string[] {
  const found: string[] = [];
  const walk = (folder: string): void => {
    for (const entry of readdirSync(path.join(root, folder), { withFileTypes: true })) {
      const name = folder === "" ? entry.name : `${folder}/${entry.name}`;
      if (entry.isDirectory() && !skipped.has(entry.name)) walk(name);
      else if (entry.isFile() && source.test(entry.name) && entry.name !== "next-env.d.ts") found.push(name);
    }
  };
  walk("");
  return found.sort();
}

export function isTest(file: string): boolean {
  return file.startsWith("tests/");
}

export function readSource(root: string, file: string): string {
  return readFileSync(path.join(root, file), "utf8");
}
