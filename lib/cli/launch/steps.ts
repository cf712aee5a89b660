/** What a step of the tests came to. */
export interface Tally {
  passed: number;
  failed: number;
  skipped: number;
}

export interface Step {
  name: string;
  /** Runs it and counts; a throw counts as one failure, and the steps after it run all the same. */
  run(): Promise<Tally>;
}

export interface StepResult extends Tally {
  name: string;
  seconds: number;
}

/**
 * Runs groups of steps one after the other, and the steps of a group side by side, whatever fails, until `stopped` says
 * so. Results come in the order of the steps.
 */
export async function runSteps(
  groups: readonly (readonly Step[])[],
  stopped: () => boolean,
  say: (line: string) => void,
  now: () => number,
): Promise<StepResult[]> {
  const run = async (step: Step): Promise<StepResult> => {
    const began = now();
    const tally = await step.run().catch((error: unknown): Tally => {
      say(error instanceof Error ? error.message : String(error));
      return { passed: 0, failed: 1, skipped: 0 };
    });
    return { ...tally, name: step.name, seconds: Math.round((now() - began) / 1000) };
  };
  const results: StepResult[] = [];
  for (const group of groups) {
    if (stopped()) break;
    say(`\n=== ${group.map(({ name }) => name).join(", ")}`);
    results.push(...(await Promise.all(group.map(run))));
  }
  return results;
}

/** The table that closes a run; its last line is what machines read. */
export function summary(results: StepResult[]): string {
  const width = Math.max(...results.map((each) => each.name.length), 0);
  const lines = results.map(
    (each) =>
      `${each.name.padEnd(width)}  ${each.passed} passed, ${each.failed} failed` +
      `${each.skipped > 0 ? `, ${each.skipped} skipped` : ""} (${each.seconds} s)`,
  );
  const sum = (key: keyof Tally): number => results.reduce((total, each) => total + each[key], 0);
  const skipped = sum("skipped") > 0 ? `, ${sum("skipped")} skipped` : "";
  return [...lines, "", `${sum("passed")} passed, ${sum("failed")} failed${skipped}`].join("\n");
}
