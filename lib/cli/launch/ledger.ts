import { readFileSync, renameSync, rmSync, writeFileSync } from "node:fs";
import path from "node:path";
import { z } from "zod";
import { signal, until } from "@/db/cluster/processes";
import { processIdentity } from "./process-identity";

const fileName = "launcher.json";
const processSchema = z.object({ pid: z.int().min(2), identity: z.string(), name: z.string() });
const schema = z.object({
  launcher: processSchema,
  address: z.string(),
  children: z.array(processSchema),
  /** The local services' addresses and keys, for commands run beside. */
  environment: z.record(z.string(), z.string()).optional(),
});
type Ledger = z.infer<typeof schema>;

/** Who runs from a data folder, kept in a file, so that what a killed launcher left behind is found and ended. */
export interface LaunchLedger {
  /** Adds a child that leads a process group of its own. */
  add(pid: number, name: string): void;
  /** Tells commands run beside where the local services are, until it closes. */
  tell(environment: Record<string, string>): void;
  close(): void;
}

/** Thrown when another launcher serves from the same data folder. */
export class AlreadyRunningError extends Error {
  override name = "AlreadyRunningError";
}

/**
 * Takes the folder for this launcher, after ending what a dead one left running.
 *
 * @throws AlreadyRunningError when a living launcher has it
 */
export async function openLedger(folder: string, address: string): Promise<LaunchLedger> {
  const file = path.join(folder, fileName);
  const before = read(file);
  if (before && before.launcher.pid !== process.pid && isSame(before.launcher)) {
    throw new AlreadyRunningError(
      `Fanfold already runs from ${folder} (process ${before.launcher.pid}, ${before.address}). Stop that one first.`,
    );
  }
  if (before) await endAll(before.children);
  const own = { pid: process.pid, identity: processIdentity(process.pid) ?? "", name: "launcher" };
  const ledger: Ledger = { launcher: own, address, children: [] };
  write(file, ledger);
  return {
    add(pid, name) {
      ledger.children.push({ pid, identity: processIdentity(pid) ?? "", name });
      write(file, ledger);
    },
    tell(environment) {
      ledger.environment = environment;
      write(file, ledger);
    },
    close: () => rmSync(file, { force: true }),
  };
}

/** What the launcher that serves from this data folder told; undefined where none lives, or it is not so far yet. */
export function toldBy(folder: string): Record<string, string> | undefined {
  const found = read(path.join(folder, fileName));
  return found && isSame(found.launcher) ? found.environment : undefined;
}

function isSame(each: { pid: number; identity: string }): boolean {
  return each.identity !== "" && processIdentity(each.pid) === each.identity;
}

async function endAll(children: Ledger["children"]): Promise<void> {
  const left = children.filter(isSame);
  for (const [name, withinMs] of [
    ["SIGTERM", 5_000],
    ["SIGKILL", 5_000],
  ] as const) {
    for (const each of left.filter(isSame)) signal(-each.pid, name);
    if (await until(() => !left.some(isSame), withinMs)) return;
  }
}

function read(file: string): Ledger | undefined {
  try {
    return schema.parse(JSON.parse(readFileSync(file, "utf8")));
  } catch {
    return undefined;
  }
}

function write(file: string, ledger: Ledger): void {
  writeFileSync(`${file}.new`, JSON.stringify(ledger), { mode: 0o600 });
  renameSync(`${file}.new`, file);
}
