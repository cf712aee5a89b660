import { mkdirSync } from "node:fs";
import path from "node:path";
import { serverAccount } from "@/db/cluster/account";
import { chooseDataFolder } from "@/db/cluster/folder";
import { demoAccounts, demoPassword } from "@/db/seeds/demo/seed-people";
import { env } from "@/lib/env/env";
import type { Environment } from "@/lib/env/schema";
import { buildIfStale } from "./launch/build";
import { readyGivenServices } from "./launch/given-services";
import { openLedger, type LaunchLedger } from "./launch/ledger";
import { runLaunch, type Lifetime } from "./launch/lifetime";
import { startLocalServices, type LocalServices } from "./launch/local-services";
import { canListen, isLoopback } from "./launch/loopback";
import { localAddress, startSite, startWorker, untilHealthy } from "./launch/site";

const root = path.resolve(import.meta.dirname, "../..");

/** `npm start` and `npm run dev`: everything that the product needs, until told to stop. */
export async function main(order: string): Promise<void> {
  const mode = order === "dev" ? "dev" : "start";
  await runLaunch((life) => launch(life, mode));
}

async function launch(life: Lifetime, mode: "start" | "dev"): Promise<{ broken: Promise<string> }> {
  const began = Date.now();
  const settings = env();
  const demo = settings.DATABASE_URL === undefined;
  if (demo && !isLoopback(settings.HOST)) {
    throw new Error(
      `HOST=${settings.HOST} would show the demo, whose passwords are public, to others. Set DATABASE_URL to serve for real.`,
    );
  }
  const { folder, reason } = chooseDataFolder(root, demo ? serverAccount() : undefined, settings.DATA_DIR);
  if (reason !== undefined) console.log(`The data folder is ${folder}, since ${reason}.`);
  mkdirSync(folder, { recursive: true });
  const address = localAddress(settings);
  const ledger = await openLedger(folder, address);
  life.onStop(async () => ledger.close());
  if (!(await canListen(settings.HOST, settings.PORT))) {
    throw new Error(`Port ${settings.PORT} of ${settings.HOST} is taken. Choose another: PORT=3001 npm start`);
  }
  // Both at once: the build keeps a processor busy while the database is made and filled.
  const [services] = await Promise.all([
    readyServices(life, ledger, folder, settings),
    mode === "start" ? buildIfStale(life, ledger, root) : undefined,
  ]);
  life.check();
  const site = startSite(life, ledger, root, mode, settings, services.environment);
  const worker = startWorker(life, ledger, root, services.environment);
  const early = Promise.race([services.firstEnd, site.firstEnd, worker.firstEnd]).then((what) => {
    throw new Error(what);
  });
  await Promise.race([untilHealthy(life, address), early]);
  early.catch(() => undefined);
  announce(address, folder, demo, Date.now() - began);
  return { broken: Promise.race([services.broken, site.gaveUp, worker.gaveUp]) };
}

async function readyServices(
  life: Lifetime,
  ledger: LaunchLedger,
  dataFolder: string,
  settings: Environment,
): Promise<LocalServices> {
  if (settings.DATABASE_URL === undefined) return startLocalServices({ root, dataFolder, life, ledger }, settings);
  const { demo } = await readyGivenServices(settings, settings.DATABASE_URL);
  const environment = { DATA_DIR: dataFolder, ...(demo && { FANFOLD_DEMO: "1" }) };
  const never = new Promise<string>(() => undefined);
  return { environment, firstEnd: never, broken: never };
}

function announce(address: string, folder: string, demo: boolean, tookMs: number): void {
  const lines = [`Fanfold is ready at ${address} (after ${Math.round(tookMs / 1000)} s).`];
  if (demo) {
    lines.push(`This is the demo: all figures are invented. Its data lies in ${folder}.`);
    lines.push(`Sign in with the password ${demoPassword} as:`);
    for (const account of demoAccounts) lines.push(`  ${account.email}`);
  }
  lines.push("Ctrl-C stops it.");
  console.log(`\n${lines.join("\n")}\n`);
}
