import { createReadStream } from "node:fs";
import { parseArgs } from "node:util";
import { analyseLog, type LogReport } from "@/lib/science/logs/analyse-log";
import { LogReader } from "@/lib/science/logs/log-reader";
import { Refusal } from "@/lib/science/refusal";
import { HOUSE_RULE } from "@/lib/science/thermal/steady-window";
import { unreadableReason } from "./fail";

/**
 * `log FILE.csv [--sensor NAME --ambient NAME | --level NAME] [--eps K]`: one report of a log file.
 * @throws Refusal for bad arguments, an unreadable file or one that is no log
 */
export async function readLog(args: string[]): Promise<LogReport> {
  const { file, choice, epsilonK } = parse(args);
  const reader = new LogReader(choice);
  try {
    for await (const chunk of createReadStream(file, { highWaterMark: 1 << 18 })) {
      if (chunk instanceof Uint8Array) reader.push(chunk);
    }
  } catch (error) {
    if (error instanceof Refusal) throw error;
    throw new Refusal("unreadable-file", `the file can't be read: ${unreadableReason(error)}`, file);
  }
  return analyseLog(reader.finish(), epsilonK);
}

function parse(args: string[]) {
  const options = {
    sensor: { type: "string" },
    ambient: { type: "string" },
    level: { type: "string" },
    eps: { type: "string" },
  } as const;
  let parsed;
  try {
    parsed = parseArgs({ args, options, allowPositionals: true });
  } catch (error) {
    throw new Refusal("bad-arguments", error instanceof Error ? error.message : "the arguments can't be read");
  }
  const [file, ...more] = parsed.positionals;
  if (file === undefined || more.length > 0) throw new Refusal("bad-arguments", "one log file is needed");
  const { sensor, ambient, level, eps } = parsed.values;
  const epsilonK = eps === undefined ? HOUSE_RULE.epsilonK : eps.trim() === "" ? Number.NaN : Number(eps);
  if (!(epsilonK > 0 && Number.isFinite(epsilonK)))
    throw new Refusal("bad-arguments", "--eps is a number of kelvins above 0", "--eps");
  const choice = {
    ...(sensor === undefined ? {} : { sensor }),
    ...(ambient === undefined ? {} : { ambient }),
    ...(level === undefined ? {} : { level }),
  };
  return { file, choice, epsilonK };
}
