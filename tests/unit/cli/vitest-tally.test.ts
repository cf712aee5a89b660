import { expect, test } from "vitest";
import { tallyOf } from "@/lib/cli/launch/vitest-tally";

const report = (
  passed: number,
  failed: number,
  testResults: { status: string; assertionResults: { status: string }[] }[],
) => ({
  numPassedTests: passed,
  numFailedTests: failed,
  numPendingTests: 2,
  numTodoTests: 1,
  testResults,
});

test("passed, failed and skipped are those of the report", () => {
  const files = [{ status: "failed", assertionResults: [{ status: "failed" }, { status: "passed" }] }];
  expect(tallyOf(report(5, 1, files), 1)).toEqual({ passed: 5, failed: 1, skipped: 3 });
});

test("a file that could not be read counts as a failure beside those of others", () => {
  const files = [
    { status: "failed", assertionResults: [] },
    { status: "failed", assertionResults: [{ status: "failed" }] },
  ];
  expect(tallyOf(report(5, 1, files), 1)).toMatchObject({ failed: 2 });
});

test("no report, no test, or a bad end without a failed test is a failure", () => {
  expect(tallyOf(undefined, 0)).toMatchObject({ failed: 1 });
  expect(tallyOf(report(0, 0, []), 0)).toMatchObject({ failed: 1 });
  expect(tallyOf(report(9, 0, []), 1)).toMatchObject({ passed: 9, failed: 1 });
  expect(tallyOf(report(9, 0, []), 0)).toMatchObject({ passed: 9, failed: 0 });
});
