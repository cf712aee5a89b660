import { createHash } from "node:crypto";
import { existsSync, readdirSync, readFileSync, rmSync, writeFileSync } from "node:fs";
import path from "node:path";
import { childEnvironment } from "@/lib/env/env";
import { runChild } from "./children";
import type { LaunchLedger } from "./ledger";
import type { Lifetime } from "./lifetime";

/** What the production build is made of; what only the command line uses is left out. */
const sources = ["app", "components", "lib", "db", "search", "public"];
const files = [
  "package-lock.json",
  "package.json",
  "tsconfig.json",
  "next.config.mjs",
  "tailwind.config.ts",
  "instrumentation.ts",
  "proxy.ts",
];
const notInTheBuild = new Set(["lib/cli", "db/migrations", "db/seeds", "db/cluster"]);

/** SHA-256 over names and contents of all that the build reads. */
export function sourcesHash(root: string): string {
  const hash = createHash("sha256").update(process.versions.node);
  const add = (name: string): void => {
    hash.update(`\0${name}\0`).update(readFileSync(path.join(root, name)));
  };
  const walk = (folder: string): void => {
    if (notInTheBuild.has(folder) || !existsSync(path.join(root, folder))) return;
    const entries = readdirSync(path.join(root, folder), { withFileTypes: true });
    for (const entry of entries.sort((a, b) => (a.name < b.name ? -1 : 1))) {
      const name = `${folder}/${entry.name}`;
      if (entry.isDirectory()) walk(name);
      else if (entry.isFile()) add(name);
    }
  };
  for (const folder of sources) walk(folder);
  for (const file of files) if (existsSync(path.join(root, file))) add(file);
  return hash.digest("hex");
}

/** Builds for production when the last build was of other sources. @returns whether it built */
export async function buildIfStale(life: Lifetime, ledger: LaunchLedger | undefined, root: string): Promise<boolean> {
  const marker = path.join(root, ".next/built-from");
  const wanted = sourcesHash(root);
  if (existsSync(marker) && readFileSync(marker, "utf8") === wanted) return false;
  rmSync(marker, { force: true });
  console.log("Building the site …");
  await runChild(life, ledger, {
    name: "The production build",
    command: process.execPath,
    args: [nextProgram(root), "build"],
    cwd: root,
    env: childEnvironment({ NODE_ENV: "production", NEXT_TELEMETRY_DISABLED: "1" }),
  });
  writeFileSync(marker, wanted);
  return true;
}

export function nextProgram(root: string): string {
  return path.join(root, "node_modules/next/dist/bin/next");
}
