import { readFileSync, writeFileSync } from "node:fs";
import net from "node:net";
import path from "node:path";

/** Whether nothing listens on that port of 127.0.0.1 right now. */
export function isPortFree(port: number): Promise<boolean> {
  return new Promise((resolve) => {
    const probe = net.createServer();
    probe.once("error", () => resolve(false));
    probe.listen({ port, host: "127.0.0.1", exclusive: true }, () => probe.close(() => resolve(true)));
  });
}

/** A port of 127.0.0.1 that was free a moment ago, picked by the system. */
export function anyFreePort(): Promise<number> {
  return new Promise((resolve, reject) => {
    const probe = net.createServer();
    probe.once("error", reject);
    probe.listen({ port: 0, host: "127.0.0.1" }, () => {
      const address = probe.address();
      probe.close(() =>
        typeof address === "object" && address ? resolve(address.port) : reject(new Error("No free port was found.")),
      );
    });
  });
}

/** The port that the folder's database used last; undefined before its first start. */
export function rememberedPort(folder: string): number | undefined {
  const port = Number(readIfThere(path.join(folder, "port")));
  return Number.isInteger(port) && port > 1023 && port < 65536 ? port : undefined;
}

/** The remembered port if it is still free, else another one. */
export async function portFor(folder: string): Promise<number> {
  const before = rememberedPort(folder);
  return before !== undefined && (await isPortFree(before)) ? before : anyFreePort();
}

/** Keeps the port for the next start, and for whoever looks for the database in this folder. */
export function rememberPort(folder: string, port: number): void {
  writeFileSync(path.join(folder, "port"), `${port}\n`);
}

function readIfThere(file: string): string | undefined {
  try {
    return readFileSync(file, "utf8").trim();
  } catch {
    return undefined;
  }
}
