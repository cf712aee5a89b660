import os from "node:os";
import { benchDrawing } from "./drawing";
import { run as benchIndexQuery } from "./index-query";
import { benchLog, type BenchResult } from "./log";
import { benchMesh } from "./mesh";
import { benchPages } from "./pages";
import { run as benchSound } from "./sound";

const rooms: Record<string, () => BenchResult[] | Promise<BenchResult[]>> = {
  sound: benchSound,
  log: benchLog,
  mesh: benchMesh,
  drawing: benchDrawing,
  index: benchIndexQuery,
  pages: () => benchPages(),
};

/** Runs the rooms named on the command line, or all, one after the other, and prints each ratio beside its goal. */
async function main(): Promise<void> {
  const chosen = process.argv.slice(2);
  const unknown = chosen.filter((name) => !(name in rooms));
  if (unknown.length > 0)
    throw new Error(`No such room: ${unknown.join(", ")}. There are ${Object.keys(rooms).join(", ")}.`);
  process.stdout.write(
    `${os.cpus()[0]?.model ?? "unknown processor"}, ${os.cpus().length} cores, Node ${process.version}\n`,
  );
  for (const [name, run] of Object.entries(rooms)) {
    if (chosen.length > 0 && !chosen.includes(name)) continue;
    for (const { name: what, ratio, goal, detail } of await run()) {
      const verdict = ratio <= goal ? "within" : "ABOVE";
      process.stdout.write(`${what}: ${ratio.toFixed(2)} (${verdict} the goal of ${goal}); ${detail}\n`);
    }
  }
}

await main();
