import { spawn } from "node:child_process";
import path from "node:path";
import { childEnvironment } from "@/lib/env/env";

const root = path.resolve(import.meta.dirname, "../..");

export interface StartedProcess {
  pid: number;
  /** Resolves when its output holds the text; rejects when it ends first. */
  says(text: string): Promise<void>;
  /** SIGKILL: nothing of its own runs any more. Resolves when it is gone; once gone, at once. */
  kill(): Promise<void>;
}

/** Runs a TypeScript file of ours as a process of its own. */
export function startProcess(
  file: string,
  args: readonly string[],
  environment: Record<string, string>,
): StartedProcess {
  const env = childEnvironment({ ...environment, NODE_ENV: "test", VITEST: undefined });
  const child = spawn(process.execPath, ["--import", "tsx", file, ...args], {
    cwd: root,
    env: env as NodeJS.ProcessEnv,
    stdio: ["ignore", "pipe", "pipe"],
  });
  let said = "";
  let heard: () => void = () => undefined;
  for (const stream of [child.stdout, child.stderr]) {
    stream.on("data", (chunk: Buffer) => {
      said += chunk.toString();
      heard();
    });
  }
  const ended = new Promise<void>((resolve) => child.once("exit", () => resolve()));
  return {
    pid: child.pid ?? 0,
    says: (text) =>
      new Promise((resolve, reject) => {
        heard = () => said.includes(text) && resolve();
        heard();
        void ended.then(() => reject(new Error(`${file} ended:\n${said}`)));
      }),
    async kill() {
      child.kill("SIGKILL");
      await ended;
    },
  };
}
