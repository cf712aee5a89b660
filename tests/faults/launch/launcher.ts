import { spawn } from "node:child_process";
import { readdirSync, readFileSync } from "node:fs";
import path from "node:path";
import { childEnvironment } from "@/lib/env/env";

const root = path.resolve(import.meta.dirname, "../../..");

export interface Launcher {
  pid: number;
  /** Everything it has said so far. */
  said(): string;
  /** Resolves when it says that it is ready; rejects when it ends instead. */
  ready: Promise<void>;
  /** Exit code, or the signal that ended it. */
  ended: Promise<number | NodeJS.Signals>;
  signal(name: NodeJS.Signals): void;
}

const cleared = [
  ...["DATABASE_URL", "MIGRATE_DATABASE_URL", "PUBLIC_DATABASE_URL", "MEILI_HOST", "MEILI_API_KEY"],
  ...["S3_ENDPOINT", "S3_BUCKET", "SMTP_URL", "NEXTAUTH_URL", "NEXTAUTH_SECRET", "HOST", "NODE_ENV", "VITEST"],
];

/** Runs what `npm start` runs, with these settings. All that it starts carries FANFOLD_TEST_MARK, by which it is found. */
export function launch(settings: Record<string, string>, mark: string): Launcher {
  const env = childEnvironment({
    ...Object.fromEntries(cleared.map((name) => [name, undefined])),
    ...settings,
    FANFOLD_TEST_MARK: mark,
  });
  const child = spawn(process.execPath, ["lib/cli/launch.mjs", "start"], {
    cwd: root,
    env: env as NodeJS.ProcessEnv,
    stdio: ["ignore", "pipe", "pipe"],
  });
  let text = "";
  const ended = new Promise<number | NodeJS.Signals>((resolve) => {
    child.once("exit", (code, signal) => resolve(code ?? signal ?? 1));
  });
  const ready = new Promise<void>((resolve, reject) => {
    const hear = (chunk: Buffer): void => {
      text += chunk.toString();
      if (text.includes("Fanfold is ready at")) resolve();
    };
    child.stdout.on("data", hear);
    child.stderr.on("data", hear);
    void ended.then(() => reject(new Error(`It ended:\n${text}`)));
  });
  ready.catch(() => undefined);
  if (child.pid === undefined) throw new Error("The launcher could not be started.");
  return { pid: child.pid, said: () => text, ready, ended, signal: (name) => void child.kill(name) };
}

/** Processes that carry the mark in their environment. The database runs with a bare one: look for it in its folder. */
export function marked(mark: string): number[] {
  return readdirSync("/proc")
    .filter((name) => /^\d+$/.test(name))
    .flatMap((name) => {
      try {
        const found = readFileSync(`/proc/${name}/environ`, "utf8").split("\0").includes(`FANFOLD_TEST_MARK=${mark}`);
        return found ? [Number(name)] : [];
      } catch {
        return [];
      }
    });
}
