import path from "node:path";
import { defineConfig } from "vitest/config";

const root = path.resolve(import.meta.dirname, "../..");

/** One project a kind of test, so that each can be run alone: `--project reference`. */
const plain = (name: string, extra: Record<string, unknown> = {}) => ({
  extends: true as const,
  test: {
    name,
    include: [`tests/${name}/**/*.test.{ts,tsx}`],
    environment: "node" as const,
    setupFiles: ["tests/setup/quiet-console.ts"],
    ...extra,
  },
});

/** Real servers answer, so a hook may wait for one to come up; no test asserts on time. */
const patient = { testTimeout: 120_000, hookTimeout: 300_000 };

/** Runs against the product as `npm start` serves it, one file after the other: they share its database. */
const served = {
  ...patient,
  testTimeout: 240_000,
  globalSetup: ["tests/setup/server-setup.ts"],
  fileParallelism: false,
};

export default defineConfig({
  root,
  resolve: { alias: { "@": root } },
  test: {
    maxWorkers: 2,
    maxConcurrency: 2,
    projects: [
      plain("architecture", { testTimeout: 180_000 }),
      plain("unit", { testTimeout: 120_000 }),
      plain("reference", { testTimeout: 180_000 }),
      plain("recorded", { testTimeout: 120_000 }),
      plain("db", { ...patient, globalSetup: ["tests/setup/cluster-setup.ts"] }),
      plain("faults", { ...patient, testTimeout: 400_000, fileParallelism: false }),
      plain("api", served),
      plain("browser", served),
    ],
  },
});
