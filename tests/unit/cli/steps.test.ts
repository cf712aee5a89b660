import { expect, test } from "vitest";
import { runSteps, summary, type Step } from "@/lib/cli/launch/steps";

const step = (name: string, outcome: () => { passed: number; failed: number; skipped: number }): Step => ({
  name,
  run: async () => outcome(),
});

test("a step that throws is one failure and the next one still runs; the last line is the sum", async () => {
  const said: string[] = [];
  const results = await runSteps(
    [
      [
        step("one", () => {
          throw new Error("it broke");
        }),
      ],
      [step("two", () => ({ passed: 3, failed: 0, skipped: 1 }))],
    ],
    () => false,
    (line) => said.push(line),
    () => 0,
  );
  expect(said).toContain("it broke");
  expect(summary(results).split("\n").at(-1)).toBe("3 passed, 1 failed, 1 skipped");
});

test("nothing more begins once it is stopped", async () => {
  let stopped = false;
  const results = await runSteps(
    [
      [
        step("one", () => {
          stopped = true;
          return { passed: 1, failed: 0, skipped: 0 };
        }),
      ],
      [step("two", () => ({ passed: 1, failed: 0, skipped: 0 }))],
    ],
    () => stopped,
    () => undefined,
    () => 0,
  );
  expect(results.map((each) => each.name)).toEqual(["one"]);
});

test("the steps of a group run side by side, and are told in their order", async () => {
  let free = (): void => undefined;
  const freed = new Promise<void>((resolve) => {
    free = resolve;
  });
  const waiting: Step = {
    name: "waits for the other",
    run: async () => {
      await freed;
      return { passed: 1, failed: 0, skipped: 0 };
    },
  };
  const freeing = step("frees it", () => {
    free();
    return { passed: 2, failed: 0, skipped: 0 };
  });
  const results = await runSteps(
    [[waiting, freeing]],
    () => false,
    () => undefined,
    () => 0,
  );
  expect(results.map(({ passed }) => passed)).toEqual([1, 2]);
});
