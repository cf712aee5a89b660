import { spawn, type ChildProcess, type StdioOptions } from "node:child_process";
import { signal, until } from "@/db/cluster/processes";
import type { LaunchLedger } from "./ledger";
import type { Lifetime } from "./lifetime";

export interface ChildOptions {
  name: string;
  command: string;
  args: string[];
  cwd: string;
  env: Record<string, string>;
  stdio?: StdioOptions;
}

export interface RunningChild {
  pid: number;
  /** Its exit code, or 1 when a signal ended it. */
  ended: Promise<number>;
  stop(): Promise<void>;
}

/** Starts a child as the leader of its own process group, which is what is signalled, so that its children end with it. */
export function startChild(life: Lifetime, ledger: LaunchLedger | undefined, options: ChildOptions): RunningChild {
  life.check();
  const { command, args, cwd, env, stdio = ["ignore", "inherit", "inherit"] } = options;
  const child = spawn(command, args, { cwd, env: env as NodeJS.ProcessEnv, stdio, detached: true });
  const ended = new Promise<number>((resolve) => {
    child.once("error", () => resolve(1));
    child.once("exit", (code) => resolve(code ?? 1));
  });
  if (child.pid === undefined) throw new Error(`${options.name} could not be started.`);
  const pid = child.pid;
  ledger?.add(pid, options.name);
  const stop = (): Promise<void> => stopGroup(child, pid);
  life.onStop(stop, "together");
  return { pid, ended, stop };
}

/** Runs a child to its end. @throws when it fails */
export async function runChild(life: Lifetime, ledger: LaunchLedger | undefined, options: ChildOptions): Promise<void> {
  const code = await startChild(life, ledger, options).ended;
  life.check();
  if (code !== 0) throw new Error(`${options.name} failed (exit ${code}).`);
}

/** Asks the group to end, then ends it; waits until its leader is gone and no member is left. */
async function stopGroup(child: ChildProcess, pid: number): Promise<void> {
  const gone = (): boolean => (child.exitCode !== null || child.signalCode !== null) && !groupLives(pid);
  for (const [name, withinMs] of [
    ["SIGTERM", 8_000],
    ["SIGKILL", 5_000],
  ] as const) {
    if (gone()) return;
    signal(-pid, name);
    if (await until(gone, withinMs)) return;
  }
}

function groupLives(leader: number): boolean {
  try {
    process.kill(-leader, 0);
    return true;
  } catch {
    return false;
  }
}
