import { spawn, type ChildProcess } from "node:child_process";
import { closeSync, openSync, readFileSync, rmSync } from "node:fs";
import path from "node:path";
import type { ServerAccount } from "./account";
import { binariesFor, serverEnvironment } from "./initialise";
import { isAlive, postmasterPid, processesIn, signal, until } from "./processes";

/** Fast shutdown: sessions are ended and everything is written. */
const stopSignal = "SIGINT";

/**
 * Ends whatever an earlier start left running in this data folder (its launcher was killed), and takes away a pid file
 * whose number meanwhile belongs to another program. Any other pid file is left to PostgreSQL, which also looks at its
 * shared memory.
 */
export async function clearLeftovers(pgdata: string): Promise<"nothing" | "stopped an old server"> {
  const pid = postmasterPid(pgdata);
  const here = processesIn(pgdata);
  if (pid !== undefined && isAlive(pid) && !here.includes(pid)) {
    if (here.length === 0) rmSync(path.join(pgdata, "postmaster.pid"), { force: true });
  }
  if (here.length === 0) return "nothing";
  if (pid !== undefined && here.includes(pid)) signal(pid, stopSignal);
  if (!(await until(() => processesIn(pgdata).length === 0, 20_000))) {
    for (const left of processesIn(pgdata)) signal(left, "SIGKILL");
    await until(() => processesIn(pgdata).length === 0, 5_000);
  }
  return "stopped an old server";
}

export interface StartedServer {
  child: ChildProcess;
  pid: number;
  /** The end of its log, for messages. */
  logTail(): string;
}

/**
 * Starts the server on 127.0.0.1 without a Unix socket, in a session of its own, so that Ctrl-C in the terminal reaches
 * the launcher alone, which stops things in order.
 *
 * @param tuning further settings, as name and value
 */
export function spawnServer(
  pgdata: string,
  port: number,
  account: ServerAccount | undefined,
  tuning: Record<string, string>,
): StartedServer {
  const settings: Record<string, string> = {
    listen_addresses: "127.0.0.1",
    port: String(port),
    unix_socket_directories: "",
    password_encryption: "scram-sha-256",
    timezone: "UTC",
    log_timezone: "UTC",
    max_connections: "120",
    ...tuning,
  };
  const logFile = path.join(path.dirname(pgdata), "postgres.log");
  const log = openSync(logFile, "w", 0o600);
  const child = spawn(
    path.join(binariesFor(pgdata).folder, "postgres"),
    ["-D", pgdata, ...Object.entries(settings).flatMap(([name, value]) => ["-c", `${name}=${value}`])],
    {
      cwd: pgdata,
      uid: account?.uid,
      gid: account?.gid,
      detached: true,
      stdio: ["ignore", log, log],
      env: serverEnvironment,
    },
  );
  closeSync(log);
  child.on("error", () => undefined);
  if (child.pid === undefined) throw new Error("The database server could not be started.");
  const logTail = () => readFileSync(logFile, "utf8").trimEnd().split("\n").slice(-8).join("\n");
  return { child, pid: child.pid, logTail };
}

/** Stops a server by its process id: fast, then at once, then by force. Waits until it is gone. */
export async function stopServer(server: StartedServer): Promise<void> {
  const ended = () => server.child.exitCode !== null || server.child.signalCode !== null;
  for (const [name, withinMs] of [
    [stopSignal, 15_000],
    ["SIGQUIT", 5_000],
    ["SIGKILL", 5_000],
  ] as const) {
    if (ended()) return;
    signal(server.pid, name);
    if (await until(ended, withinMs)) return;
  }
}
