import { createReadStream } from "node:fs";
import { parentPort, workerData } from "node:worker_threads";
import { parse } from "csv-parse";
import { analyseLog } from "@/lib/science/logs/analyse-log";
import { LogReader } from "@/lib/science/logs/log-reader";

/** One timed reading inside a worker; "idle" only loads what the others load. */
async function read(kind: string, path: string): Promise<number> {
  if (kind === "idle") return 0;
  if (kind === "ours") {
    const reader = new LogReader();
    for await (const chunk of createReadStream(path, { highWaterMark: 1 << 18 })) reader.push(chunk as Uint8Array);
    return analyseLog(reader.finish()).rows;
  }
  let rows = 0;
  const parser = createReadStream(path).pipe(parse({ fromLine: 2 }));
  for await (const record of parser) rows += (record as string[]).length > 0 ? 1 : 0;
  return rows;
}

const { kind, path } = workerData as { kind: string; path: string };
const begin = performance.now();
const rows = await read(kind, path);
parentPort?.postMessage({ rows, ms: performance.now() - begin });
