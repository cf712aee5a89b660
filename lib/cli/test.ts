import { chmodSync, existsSync, mkdtempSync, readFileSync, rmSync } from "node:fs";
import os from "node:os";
import path from "node:path";
import { serverAccount } from "@/db/cluster/account";
import { startCluster, throwAwayTuning } from "@/db/cluster/cluster";
import { childEnvironment } from "@/lib/env/env";
import { buildIfStale, nextProgram } from "./launch/build";
import { runChild, startChild } from "./launch/children";
import { ensurePostgres, installPackages, mayInstall } from "./launch/debian";
import { prepareDemoDatabase, seedInChild } from "./launch/demo-seed";
import { demoDatabase } from "./launch/local-services";
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
  const seeded = mkdtempSync(path.join(os.tmpdir(), "fanfold-seeded-"));
  const remove = (): void => [folder, seeded].forEach((each) => rmSync(each, { recursive: true, force: true }));
  process.once("exit", remove);
  const groups = allSteps(life, folder, seeded)
    .map((group) => group.filter(({ name }) => chosen.length === 0 || chosen.includes(name)))
    .filter((group) => group.length > 0);
  const results = await runSteps(
    groups,
    () => signalled,
    (line) => console.log(line),
    () => Date.now(),
  );
  if (signalled) return;
  await life.stopAll();
  console.log(`\n${summary(results)}`);
  process.exit(results.length > 0 && results.every((each) => each.failed === 0) ? 0 : 1);
}

/** In their order; what stands in one group uses a core each at most and nothing of the others: it runs side by side. */
function allSteps(life: Lifetime, folder: string, seeded: string): Step[][] {
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
    run: () => runVitest(life, path.join(folder, `${name}.json`), projects.length === 0 ? [name] : projects, seeded),
  });
  return [
    [{ name: "packages", run: () => ensurePackages(life) }],
    [
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
    ],
    [vitest("fast", "architecture", "unit", "reference", "recorded")],
    [vitest("db")],
    [
      {
        name: "build",
        async run() {
          await buildIfStale(life, undefined, root);
          return one;
        },
      },
      { name: "demo", run: () => seedOnce(life, seeded) },
    ],
    // Each waits more than it computes: for processes to die and come back, for one answer after the other.
    [vitest("api"), vitest("faults")],
    [vitest("browser")],
  ];
}

function nodeChild(args: string[], more: Record<string, string> = {}) {
  const cleared = Object.fromEntries(notInherited.map((name) => [name, undefined]));
  const env = childEnvironment({ ...cleared, CI: "true", NEXT_TELEMETRY_DISABLED: "1", ...more });
  return { command: process.execPath, args, cwd: root, env };
}

async function runVitest(life: Lifetime, reportFile: string, projects: string[], seeded: string): Promise<Tally> {
  const child = startChild(life, undefined, {
    name: `vitest ${projects.join(" ")}`,
    ...nodeChild(
      [
        path.join(root, "node_modules/vitest/vitest.mjs"),
        "run",
        "--config",
        "tests/setup/vitest.config.ts",
        ...projects.flatMap((project) => ["--project", project]),
        "--reporter=default",
        "--reporter=json",
        `--outputFile.json=${reportFile}`,
      ],
      existsSync(path.join(seeded, "postgres")) ? { FANFOLD_SEEDED_FOLDER: seeded } : {},
    ),
  });
  const code = await child.ended;
  return tallyOf(existsSync(reportFile) ? JSON.parse(readFileSync(reportFile, "utf8")) : undefined, code);
}

/** Makes one data folder with the demo in it, of which every served test takes a copy instead of seeding anew. */
async function seedOnce(life: Lifetime, folder: string): Promise<Tally> {
  chmodSync(folder, 0o711);
  const cluster = await startCluster({ folder, account: serverAccount(), tuning: throwAwayTuning });
  try {
    life.onStop(() => cluster.stop());
    await prepareDemoDatabase(cluster, demoDatabase, seedInChild(life, undefined, root, folder));
  } catch (error) {
    await cluster.stop();
    rmSync(path.join(folder, "postgres"), { recursive: true, force: true });
    throw error;
  }
  await cluster.stop();
  return one;
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
