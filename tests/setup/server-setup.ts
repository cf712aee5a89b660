import { spawn, type ChildProcess } from "node:child_process";
import { createWriteStream, readFileSync, rmSync } from "node:fs";
import path from "node:path";
import type { TestProject } from "vitest/node";
import { knownUrls, type DatabaseUrls } from "@/db/cluster/cluster";
import { anyFreePort } from "@/db/cluster/port";
import { demoDatabase } from "@/lib/cli/launch/local-services";
import { childEnvironment } from "@/lib/env/env";
import { onInterrupt } from "./interrupt";
import { dataFolderOfOnesOwn } from "./seeded-folder";

declare module "vitest" {
  interface ProvidedContext {
    server: { baseUrl: string; dataFolder: string; urls: DatabaseUrls };
  }
}

const root = path.resolve(import.meta.dirname, "../..");

/** Starts the product as `npm start` does, demo and all, with a data folder and a port of its own; one a project. */
export default async function setup(project: TestProject): Promise<() => Promise<void>> {
  const dataFolder = dataFolderOfOnesOwn("served");
  const logFile = path.join(dataFolder, "start.log");
  const port = await anyFreePort();
  const child = spawn(process.execPath, ["lib/cli/launch.mjs", "start"], {
    cwd: root,
    env: environment(port, dataFolder) as NodeJS.ProcessEnv,
    stdio: ["ignore", "pipe", "pipe"],
  });
  const log = createWriteStream(logFile, { flags: "a" });
  const ended = new Promise<void>((resolve) => child.once("exit", () => resolve()));
  const stop = async (): Promise<void> => {
    child.kill("SIGTERM");
    await ended;
    rmSync(dataFolder, { recursive: true, force: true });
  };
  const forget = onInterrupt(stop);
  try {
    await untilReady(child, log, ended);
    const urls = knownUrls(dataFolder, demoDatabase);
    if (!urls) throw new Error("The server is ready but its database is not to be found.");
    project.provide("server", { baseUrl: `http://127.0.0.1:${port}`, dataFolder, urls });
  } catch (error) {
    const said = readFileSync(logFile, "utf8").split("\n").slice(-40).join("\n");
    await stop();
    throw new Error(`npm start did not come up:\n${said}`, { cause: error });
  }
  return async () => {
    forget();
    await stop();
  };
}

/** The settings of whoever runs the tests don't reach the server under test. */
function environment(port: number, dataFolder: string): Record<string, string> {
  const cleared = ["DATABASE_URL", "MIGRATE_DATABASE_URL", "PUBLIC_DATABASE_URL", "MEILI_HOST", "MEILI_API_KEY"];
  const more = [
    "S3_ENDPOINT",
    "S3_BUCKET",
    "SMTP_URL",
    "NEXTAUTH_URL",
    "NEXTAUTH_SECRET",
    "HOST",
    "NODE_ENV",
    "VITEST",
  ];
  return childEnvironment({
    ...Object.fromEntries([...cleared, ...more].map((name) => [name, undefined])),
    PORT: String(port),
    DATA_DIR: dataFolder,
  });
}

/** Follows the launcher's output into the log until it says that it is ready. */
function untilReady(child: ChildProcess, log: NodeJS.WritableStream, ended: Promise<void>): Promise<void> {
  return new Promise((resolve, reject) => {
    const hear = (chunk: Buffer): void => {
      log.write(chunk);
      if (chunk.includes("Fanfold is ready at")) resolve();
    };
    child.stdout?.on("data", hear);
    child.stderr?.on("data", hear);
    void ended.then(() => log.end(() => reject(new Error("It ended."))));
  });
}
