import path from "node:path";
import { defineConfig } from "vitest/config";

const root = path.resolve(import.meta.dirname, "../..");

/** One project a kind of test, so that each can be run alone: `--project reference`. */
const plain = (name: string, extra: Record<string, unknown> = {}) => ({
  extends: true as const,
  test: { name, include: [`tests/${name}/**/*.test.{ts,tsx}`], environment: "node" as const, ...extra },
});

export default defineConfig({
  root,
  resolve: { alias: { "@": root } },
  test: {
    projects: [plain("architecture"), plain("unit"), plain("reference"), plain("recorded")],
  },
});
