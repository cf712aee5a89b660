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

/** The port that the folder's database used last if it is still free, else another, which is then remembered. */
export async function rememberedPort(folder: string): Promise<number> {
  const file = path.join(folder, "port");
  const before = Number(readIfThere(file));
  if (Number.isInteger(before) && before > 1023 && before < 65536 && (await isPortFree(before))) return before;
  const port = await anyFreePort();
  writeFileSync(file, `${port}\n`);
  return port;
}

function readIfThere(file: string): string | undefined {
  try {
    return readFileSync(file, "utf8").trim();
  } catch {
    return undefined;
  }
}
