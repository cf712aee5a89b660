// Runs before anything is installed, so it uses Node alone: checks Node, installs what the lock file says, and hands over.
import path from "node:path";
import { pathToFileURL } from "node:url";
import { ensureDependencies } from "./launch/dependencies.mjs";

const root = path.resolve(import.meta.dirname, "../..");
const orders = ["start", "dev", "test", "bench"];
const order = process.argv[2] ?? "start";

const [major = 0, minor = 0] = process.versions.node.split(".").map(Number);
if (major < 20 || (major === 20 && minor < 9)) {
  console.error(`Fanfold needs Node.js 20.9 or newer; this is ${process.versions.node}.`);
  process.exit(1);
}
if (!orders.includes(order)) {
  console.error(`Unknown order ${order}. Use one of: ${orders.join(", ")}`);
  process.exit(1);
}

process.chdir(root);
try {
  await ensureDependencies(root);
} catch (error) {
  console.error(error instanceof Error ? error.message : error);
  process.exit(1);
}
const { register } = await import("tsx/esm/api");
register();
const file = { start: "start.ts", dev: "start.ts", test: "test.ts", bench: "bench.ts" }[order];
const { main } = await import(pathToFileURL(path.join(root, "lib/cli", file)).href);
await main(order, process.argv.slice(3));
