import { childEnvironment } from "@/lib/env/env";
import type { Environment } from "@/lib/env/schema";
import { nextProgram } from "./build";
import { keepChild, type KeptChild } from "./kept-child";
import type { LaunchLedger } from "./ledger";
import type { Lifetime } from "./lifetime";

/** Starts the site: the production server, or the one for working on it. */
export function startSite(
  life: Lifetime,
  ledger: LaunchLedger,
  root: string,
  mode: "start" | "dev",
  settings: Environment,
  environment: Record<string, string>,
): KeptChild {
  return keepChild(life, ledger, {
    name: "site",
    command: process.execPath,
    args: [nextProgram(root), mode, "-H", settings.HOST, "-p", String(settings.PORT)],
    cwd: root,
    env: childEnvironment({
      ...environment,
      NODE_ENV: mode === "start" ? "production" : "development",
      NEXT_TELEMETRY_DISABLED: "1",
    }),
  });
}

/** Starts the worker: jobs, and the loops that send what was written down to be sent. */
export function startWorker(
  life: Lifetime,
  ledger: LaunchLedger,
  root: string,
  environment: Record<string, string>,
): KeptChild {
  return keepChild(life, ledger, {
    name: "worker",
    command: process.execPath,
    args: ["--import", "tsx", "lib/cli/worker.ts"],
    cwd: root,
    env: childEnvironment({ NODE_ENV: "production", ...environment }),
  });
}

/** An address to ask this machine's site at, whatever it listens on. */
export function localAddress(settings: Environment): string {
  const host = settings.HOST === "0.0.0.0" ? "127.0.0.1" : settings.HOST === "::" ? "[::1]" : settings.HOST;
  return `http://${host.includes(":") && !host.startsWith("[") ? `[${host}]` : host}:${settings.PORT}`;
}

/** Asks the site until it says that all of its parts are ready. @throws with its last answer when it takes too long */
export async function untilHealthy(life: Lifetime, address: string, withinMs = 120_000): Promise<void> {
  const end = Date.now() + withinMs;
  let last = "no answer";
  while (Date.now() < end) {
    life.check();
    try {
      const answer = await fetch(`${address}/api/v1/health`, { signal: AbortSignal.timeout(5_000) });
      last = `${answer.status} ${(await answer.text()).slice(0, 500)}`;
      if (answer.ok) return;
    } catch {
      // Not listening yet.
    }
    await new Promise((resolve) => setTimeout(resolve, 250));
  }
  throw new Error(`The site did not become ready: ${last}`);
}
