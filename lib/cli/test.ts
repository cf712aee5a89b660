import { existsSync, mkdtempSync, readFileSync, rmSync } from "node:fs";
import os from "node:os";
import path from "node:path";
import { childEnvironment } from "@/lib/env/env";
import { buildIfStale, nextProgram } from "./launch/build";
import { runChild, startChild } from "./launch/children";
import { ensurePostgres, installPackages, mayInstall } from "./launch/debian";
import { lifetime, type Lifetime } from "./launch/lifetime";
import { runSteps, summary, type Step, type Tally } from "./launch/steps";
import { tallyOf } from "./launch/vitest-tally";

const root = path.resolve(import.meta.dirname, "../..");
const one: Tally = { passed: 1, failed: 0, skipped: 0 };

/** What the tests must not inherit: they bring services of their own. A given S3 or search service is tried as well. */
const notInherited = [
  "DATABASE_URL",
  "MIGRATE_DATABASE_URL",
  "PUBLIC_DATABASE_URL",
  "SMTP_URL",
  "NEXTAUTH_URL",
  "NEXTAUTH_SECRET",
  "FANFOLD_DEMO",
  "DATA_DIR",
  "PORT",
  "HOST",
  "NODE_ENV",
];

/** `npm test`: everything, on a clean clone too. Goes on after failures and closes with the sum. */
export async function main(_order: string, chosen: string[]): Promise<void> {
  const life = lifetime();
  let signalled = false;
  for (const name of ["SIGINT", "SIGTERM", "SIGHUP"] as const) {
    process.on(name, () => {
      signalled = true;
      void life.stopAll().then(() => process.exit(name === "SIGINT" ? 130 : 143));
    });
  }
  const folder = mkdtempSync(path.join(os.tmpdir(), "fanfold-report-"));
  const steps = allSteps(life, folder).filter((step) => chosen.length === 0 || chosen.includes(step.name));
  const results = await runSteps(
    steps,
    () => signalled,
    (line) => console.log(line),
    () => Date.now(),
  );
  rmSync(folder, { recursive: true, force: true });
  if (signalled) return;
  await life.stopAll();
  console.log(`\n${summary(results)}`);
  process.exit(results.length > 0 && results.every((each) => each.failed === 0) ? 0 : 1);
}

function allSteps(life: Lifetime, folder: string): Step[] {
  const programs = path.join(root, "node_modules");
  const node = (name: string, ...calls: string[][]): Step => ({
    name,
    async run() {
      for (const args of calls) await runChild(life, undefined, { name, ...nodeChild(args) });
      return one;
    },
  });
  const vitest = (name: string, ...projects: string[]): Step => ({
    name,
    run: () => runVitest(life, path.join(folder, `${name}.json`), projects.length === 0 ? [name] : projects),
  });
  return [
    { name: "packages", run: () => ensurePackages(life) },
    node("format", [path.join(programs, "prettier/bin/prettier.cjs"), "--check", "--log-level=warn", "."]),
    node("lint", [
      path.join(programs, "eslint/bin/eslint.js"),
      "--config",
      "tests/setup/eslint.config.mjs",
      "--max-warnings",
      "0",
      ".",
    ]),
    // The routes' own types are generated, so that they are checked on a clean clone, too.
    node("types", [nextProgram(root), "typegen"], [path.join(programs, "typescript/bin/tsc"), "--noEmit"]),
    vitest("fast", "architecture", "unit", "reference", "recorded"),
    vitest("db"),
    {
      name: "build",
      async run() {
        await buildIfStale(life, undefined, root);
        return one;
      },
    },
    vitest("api"),
    vitest("faults"),
    vitest("browser"),
  ];
}

function nodeChild(args: string[]) {
  const cleared = Object.fromEntries(notInherited.map((name) => [name, undefined]));
  const env = childEnvironment({ ...cleared, CI: "true", NEXT_TELEMETRY_DISABLED: "1" });
  return { command: process.execPath, args, cwd: root, env };
}

async function runVitest(life: Lifetime, reportFile: string, projects: string[]): Promise<Tally> {
  const child = startChild(life, undefined, {
    name: `vitest ${projects.join(" ")}`,
    ...nodeChild([
      path.join(root, "node_modules/vitest/vitest.mjs"),
      "run",
      "--config",
      "tests/setup/vitest.config.ts",
      ...projects.flatMap((project) => ["--project", project]),
      "--reporter=default",
      "--reporter=json",
      `--outputFile.json=${reportFile}`,
    ]),
  });
  const code = await child.ended;
  return tallyOf(existsSync(reportFile) ? JSON.parse(readFileSync(reportFile, "utf8")) : undefined, code);
}

/** Debian's packages that the tests call, by the program that shows they are there. The last two are reference tools. */
const needed = { "/usr/bin/chromium": "chromium" };
const wanted = { "/usr/bin/openscad": "openscad", "/usr/bin/admesh": "admesh" };

async function ensurePackages(life: Lifetime): Promise<Tally> {
  const missing = (programs: Record<string, string>): string[] =>
    Object.entries(programs).flatMap(([file, name]) => (existsSync(file) ? [] : [name]));
  if (mayInstall()) {
    const names = [...missing(needed), ...missing(wanted)];
    if (names.length > 0) await installPackages(life, names);
  }
  await ensurePostgres(life);
  for (const name of missing(wanted)) console.log(`Not run: comparisons with ${name}, which is not installed.`);
  const lacking = missing(needed);
  if (lacking.length > 0) throw new Error(`The tests need these packages of Debian: ${lacking.join(", ")}`);
  return one;
}
