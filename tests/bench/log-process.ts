import { Worker } from "node:worker_threads";

/** Runs one reading in a worker of this process and prints its time with the process's peak memory. */
const [kind, path] = process.argv.slice(2);
// A worker doesn't inherit the TypeScript loader, so it registers it first.
const loader = import.meta.resolve("tsx/esm/api");
const reading = new URL("./log-reading.ts", import.meta.url);
const code = `import { register } from "${loader}"; register(); await import("${reading}");`;
const worker = new Worker(new URL(`data:text/javascript,${encodeURIComponent(code)}`), { workerData: { kind, path } });
worker.once("message", (result: object) => {
  process.stdout.write(JSON.stringify({ ...result, peakKb: process.resourceUsage().maxRSS }));
});
worker.once("error", (error) => {
  process.stderr.write(String(error));
  process.exitCode = 1;
});
