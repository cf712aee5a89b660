import { existsSync } from "node:fs";
import path from "node:path";
import { childEnvironment } from "@/lib/env/env";
import { runChild } from "./launch/children";
import { installPackages, mayInstall } from "./launch/debian";
import { lifetime } from "./launch/lifetime";

const root = path.resolve(import.meta.dirname, "../..");

/** Debian's packages that speed is measured against, by a file that shows they are there. */
const references = {
  "/usr/lib/python3/dist-packages/scipy": "python3-scipy",
  "/usr/bin/admesh": "admesh",
};

/** `npm run bench [-- sound log mesh]`: speed as ratios, each against a reference on the same input in the same run. */
export async function main(_order: string, chosen: string[]): Promise<void> {
  const life = lifetime();
  for (const name of ["SIGINT", "SIGTERM"] as const) {
    process.on(name, () => void life.stopAll().then(() => process.exit(name === "SIGINT" ? 130 : 143)));
  }
  const missing = Object.entries(references).flatMap(([file, name]) => (existsSync(file) ? [] : [name]));
  if (missing.length > 0 && mayInstall()) await installPackages(life, missing);
  await runChild(life, undefined, {
    name: "bench",
    command: process.execPath,
    args: ["--import", "tsx", path.join(root, "tests/bench/main.ts"), ...chosen],
    cwd: root,
    env: childEnvironment({}),
  });
}
