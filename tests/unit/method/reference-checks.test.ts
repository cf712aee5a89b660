import { readFile } from "node:fs/promises";
import { beforeAll, describe, expect, it } from "vitest";
import { countChecks, countsFile, listReferenceTests, type ListedTest } from "../../reference/support/count-checks";
import { LEFT_OUT } from "../../reference/support/left-out";
import vectors from "../../reference/values/metrology.json";

let tests: ListedTest[];
beforeAll(async () => {
  tests = await listReferenceTests();
}, 300_000);

describe("the reference checks that the method page counts", () => {
  it("are as many as vitest collects today: else run tests/reference/support/count-reference-checks.ts", async () => {
    expect(JSON.parse(await readFile(countsFile, "utf8"))).toEqual(countChecks(tests));
  });

  it("stand behind every formula", () => {
    for (const [key, count] of Object.entries(countChecks(tests).formulas)) expect(count, key).toBeGreaterThan(0);
  });

  it("run every check value of the handbook of metrology, or list it with a reason", () => {
    const named = new Set(tests.flatMap(({ name }) => name.match(/\bT\d+-\d+\b/g) ?? []));
    const left = vectors.map(({ id }) => id).filter((id) => !named.has(id));
    expect(left.sort()).toEqual(Object.keys(LEFT_OUT).sort());
    for (const reason of Object.values(LEFT_OUT)) expect(reason.length).toBeGreaterThan(20);
  });
});
