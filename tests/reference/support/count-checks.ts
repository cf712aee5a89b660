import { execFile } from "node:child_process";
import { mkdtemp, readFile, rm } from "node:fs/promises";
import { tmpdir } from "node:os";
import path from "node:path";
import { promisify } from "node:util";
import { tryProperties } from "@/lib/domain/scoring/properties";
import { RULE_KINDS } from "@/lib/domain/scoring/rules";
import { FORMULA_CHECKS } from "./formula-checks";

const root = path.resolve(import.meta.dirname, "../../..");

/** Where the counts are kept for the method page; written by `count-reference-checks.ts` beside this. */
export const countsFile = path.join(root, "components/method/reference-checks.json");

export interface ListedTest {
  name: string;
  file: string;
}

/** Every reference test as vitest collects it, one a check value, without running any. */
export async function listReferenceTests(): Promise<ListedTest[]> {
  const folder = await mkdtemp(path.join(tmpdir(), "fanfold-list-"));
  const answer = path.join(folder, "tests.json");
  try {
    const vitest = path.join(root, "node_modules/vitest/vitest.mjs");
    const asked = ["list", "--config", "tests/setup/vitest.config.ts", "--project", "reference", `--json=${answer}`];
    await promisify(execFile)(process.execPath, [vitest, ...asked], { cwd: root, maxBuffer: 64 * 2 ** 20 });
    const listed = JSON.parse(await readFile(answer, "utf8")) as ListedTest[];
    return listed.map(({ name, file }) => ({ name, file: path.relative(path.join(root, "tests/reference"), file) }));
  } finally {
    await rm(folder, { recursive: true, force: true });
  }
}

const levelsDba = [30, 35, 40];
const draws = 40;
const seed = 1;

/** What the method page says of checks: how many stand behind each formula, how many in all, what of rules was tried. */
export function countChecks(tests: readonly ListedTest[]) {
  const counts = Object.entries(FORMULA_CHECKS).map(([key, places]) => {
    const found = tests.filter((test) =>
      places.some(
        ({ file, title }) => test.file === `${file}.test.ts` && (title === undefined || title.test(test.name)),
      ),
    );
    return [key, found.length] as const;
  });
  const rules = RULE_KINDS.map((kind) => {
    const trials = tryProperties({ kind, levelsDba, m: 0.6 }, seed, draws);
    return {
      kind,
      broken: trials.filter((trial) => trial.counterExample).map((trial) => trial.property),
      held: trials.filter((trial) => !trial.counterExample).map((trial) => trial.property),
    };
  });
  return { total: tests.length, formulas: Object.fromEntries(counts), properties: { draws, seed, levelsDba, rules } };
}
