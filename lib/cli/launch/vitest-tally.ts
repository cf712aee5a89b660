import { z } from "zod";
import type { Tally } from "./steps";

const reportSchema = z.object({
  numPassedTests: z.int(),
  numFailedTests: z.int(),
  numPendingTests: z.int(),
  numTodoTests: z.int(),
  testResults: z.array(z.object({ status: z.string(), assertionResults: z.array(z.object({ status: z.string() })) })),
});

/**
 * Counts a report of vitest's JSON reporter. A file that failed without a failed test (it couldn't be read, or a hook
 * threw) is one failure; so is a run that ended badly although nothing in it failed, and one that had no test.
 *
 * @param report the parsed file; undefined when there is none
 * @param exitCode how vitest ended
 */
export function tallyOf(report: unknown, exitCode: number): Tally {
  if (report === undefined) return { passed: 0, failed: 1, skipped: 0 };
  const read = reportSchema.parse(report);
  const brokenFiles = read.testResults.filter(
    (file) => file.status === "failed" && !file.assertionResults.some((each) => each.status === "failed"),
  ).length;
  const failed = read.numFailedTests + brokenFiles;
  const nothing = read.numPassedTests + failed === 0;
  return {
    passed: read.numPassedTests,
    failed: failed === 0 && (exitCode !== 0 || nothing) ? 1 : failed,
    skipped: read.numPendingTests + read.numTodoTests,
  };
}
