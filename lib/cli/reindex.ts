import { closeDbs } from "@/db/client/handles";
import { reindex, type ReindexProgress } from "@/lib/server/search/reindex";
import { adoptRunningDemo } from "./launch/running-demo";

/** `npm run reindex`: fills the search index anew while readers go on searching the old one, and says how far it is. */
let said = "";

function tell({ sent, total, byWorker }: ReindexProgress): void {
  const percent = total === 0 ? 100 : Math.min(100, Math.floor((100 * sent) / total));
  const line = `${byWorker ? "The worker fills the index" : "Filling the index"}: ${sent} of ${total} entries, ${percent} %`;
  if (line !== said) process.stdout.write(`${line}\n`);
  said = line;
}

try {
  adoptRunningDemo();
  await reindex(tell);
  process.stdout.write("The index is filled anew and readers search it.\n");
} catch (error) {
  process.stderr.write(`${error instanceof Error ? error.message : String(error)}\n`);
  process.exitCode = 1;
} finally {
  await closeDbs();
}
