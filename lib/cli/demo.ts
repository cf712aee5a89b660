import { closeDbs, ownerDb } from "@/db/client/handles";
import { askForRebuild, searchBuild, searchState } from "@/db/queries/search-build";
import type { Handle } from "@/db/client/connect";
import { indexDigest } from "@/search/document";
import { fillField } from "./demo/fill/fill-field";
import { holdsDemo } from "./launch/demo-seed";
import { isLoopback } from "./launch/loopback";
import { ownerUrl } from "./launch/running-demo";

/**
 * `npm run demo -- --designs N`: fills the local demo up to N published entries, invented and the same every time, and
 * waits for the worker to fill the index. Refuses any database that isn't the demo of this machine.
 */
const designsMax = 1_000_000;

function wantedDesigns(args: readonly string[]): number {
  const [name, value, ...rest] = args.flatMap((arg) => arg.split("="));
  const wanted = Number(value);
  if (name !== "--designs" || rest.length > 0 || !Number.isInteger(wanted) || wanted < 1 || wanted > designsMax)
    throw new Error(`usage: npm run demo -- --designs N, with N from 1 to ${designsMax}`);
  return wanted;
}

async function demandDemo(url: string, owner: Handle): Promise<void> {
  if (!isLoopback(new URL(url).hostname.replace(/^\[|\]$/g, "")))
    throw new Error("That database is not on this machine: only the local demo is filled.");
  const found = await holdsDemo(owner).catch((error: unknown) => {
    if (error instanceof Error && "code" in error && error.code === "ECONNREFUSED")
      throw new Error("The demo's database does not run. Run npm start, leave it running, and try again.");
    throw error;
  });
  if (!found) throw new Error("That database does not hold the demo: nothing was written.");
}

/** Follows the worker's rebuild by what it writes down. */
async function untilIndexed(owner: Handle): Promise<void> {
  let last = -1;
  for (;;) {
    if ((await searchState(owner)).settingsSha256 === indexDigest()) return;
    const sent = (await searchBuild(owner))?.sent ?? 0;
    if (sent !== last) process.stdout.write(`Index: ${sent}\n`);
    last = sent;
    await new Promise((resolve) => setTimeout(resolve, 1_000));
  }
}

async function main(): Promise<void> {
  const wanted = wantedDesigns(process.argv.slice(2));
  const url = ownerUrl();
  const owner = ownerDb(url);
  try {
    await demandDemo(url, owner);
    const held = await owner("published_entry").count<{ count: number }[]>("* as count");
    const entries = wanted - Number(held[0]?.count ?? 0);
    if (entries <= 0) {
      process.stdout.write(`The demo has ${held[0]?.count ?? 0} published entries already.\n`);
      return;
    }
    await fillField(owner, {
      entries,
      onProgress: (done) => void process.stdout.write(`Database: ${done} of ${entries}\n`),
    });
    await askForRebuild(owner);
    process.stdout.write("The worker of npm start fills the search index; Ctrl-C here doesn't stop it.\n");
    await untilIndexed(owner);
    process.stdout.write(`Done: ${wanted} published entries.\n`);
  } finally {
    await owner.destroy();
    await closeDbs();
  }
}

try {
  await main();
} catch (error) {
  process.stderr.write(`${error instanceof Error ? error.message : String(error)}\n`);
  process.exitCode = 1;
}
