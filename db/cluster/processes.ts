import { readdirSync, readFileSync, readlinkSync } from "node:fs";
import path from "node:path";

/** The processes whose working folder is this one: PostgreSQL's work in their data folder, also after a crash. */
export function processesIn(folder: string): number[] {
  let entries: string[];
  try {
    entries = readdirSync("/proc");
  } catch {
    return [];
  }
  return entries.filter((name) => /^\d+$/.test(name)).flatMap((name) => (cwdOf(name) === folder ? [Number(name)] : []));
}

function cwdOf(pid: string): string | undefined {
  try {
    return readlinkSync(`/proc/${pid}/cwd`);
  } catch {
    return undefined;
  }
}

/** The postmaster's own id as its pid file in the data folder says; undefined when there is none. */
export function postmasterPid(pgdata: string): number | undefined {
  try {
    const pid = Number(readFileSync(path.join(pgdata, "postmaster.pid"), "utf8").split("\n")[0]);
    return Number.isInteger(pid) && pid > 1 ? pid : undefined;
  } catch {
    return undefined;
  }
}

export function isAlive(pid: number): boolean {
  try {
    process.kill(pid, 0);
    return true;
  } catch (error) {
    return error instanceof Error && "code" in error && error.code === "EPERM";
  }
}

export function signal(pid: number, name: NodeJS.Signals): void {
  try {
    process.kill(pid, name);
  } catch {
    // It ended between the look and the signal, which is what was wanted.
  }
}

/** Waits until the condition holds; false when it doesn't within the time. */
export async function until(condition: () => boolean, withinMs: number, everyMs = 50): Promise<boolean> {
  const end = Date.now() + withinMs;
  while (!condition()) {
    if (Date.now() > end) return false;
    await new Promise((resolve) => setTimeout(resolve, everyMs));
  }
  return true;
}
