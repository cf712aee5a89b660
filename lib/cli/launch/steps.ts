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

/** Runs steps one after the other, whatever fails, until `stopped` says so. */
export async function runSteps(
  steps: Step[],
  stopped: () => boolean,
  say: (line: string) => void,
  now: () => number,
): Promise<StepResult[]> {
  const results: StepResult[] = [];
  for (const step of steps) {
    if (stopped()) break;
    say(`\n=== ${step.name}`);
    const began = now();
    let tally: Tally;
    try {
      tally = await step.run();
    } catch (error) {
      say(error instanceof Error ? error.message : String(error));
      tally = { passed: 0, failed: 1, skipped: 0 };
    }
    results.push({ ...tally, name: step.name, seconds: Math.round((now() - began) / 1000) });
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
