import { failureLine, failureStatus, ReadError } from "./read/fail";

/** What can be read; each is loaded when asked for, so that one doesn't wait for the others. */
const READERS: Record<string, (args: string[]) => Promise<object>> = {
  sound: async (args) => (await import("./read/sound")).readSound(args),
  log: async (args) => (await import("./read/log")).readLog(args),
  round: async (args) => (await import("./read/round")).readRound(args),
  mesh: async (args) => (await import("./read/mesh")).readMesh(args),
};

/** One JSON object on standard output; on bad input exit status 2 and one line of JSON on standard error. */
async function main(args: string[]): Promise<void> {
  const [kind, ...rest] = args;
  const read = kind === undefined || !Object.hasOwn(READERS, kind) ? undefined : READERS[kind];
  if (read === undefined) {
    throw new ReadError("bad-arguments", `The first argument is ${Object.keys(READERS).join(", ")}.`, kind);
  }
  process.stdout.write(`${JSON.stringify(await read(rest))}\n`);
}

main(process.argv.slice(2)).catch((error: unknown) => {
  process.stderr.write(`${failureLine(error)}\n`);
  process.exitCode = failureStatus(error);
});
