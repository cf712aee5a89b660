import { randomBytes } from "node:crypto";
import { existsSync, readFileSync, writeFileSync } from "node:fs";
import path from "node:path";
import { serverAccount } from "@/db/cluster/account";
import { anyFreePort } from "@/db/cluster/port";
import { childEnvironment, type env } from "@/lib/env/env";
import { startMailStandIn } from "@/lib/services/mail/stand-in";
import { ensurePostgres } from "./debian";
import { prepareDemoDatabase, seedInChild } from "./demo-seed";
import { keepChild, type KeptChild } from "./kept-child";
import { keepDatabase } from "./kept-database";
import type { LaunchLedger } from "./ledger";
import type { Lifetime } from "./lifetime";

type Settings = ReturnType<typeof env>;

export interface LocalServices {
  /** What the site and the worker get set, on top of what was set before. */
  environment: Record<string, string>;
  /** Resolves with what happened when one of them ends by itself for the first time. */
  firstEnd: Promise<string>;
  /** Resolves with what broke once one of them ended too often to be started again. */
  broken: Promise<string>;
}

interface Place {
  root: string;
  dataFolder: string;
  life: Lifetime;
  ledger: LaunchLedger;
}

/** The name of the demo's database in the local cluster. */
export const demoDatabase = "fanfold";

/** Starts the demo's database, migrated and seeded, and stand-ins for the services that aren't set. */
export async function startLocalServices(place: Place, settings: Settings): Promise<LocalServices> {
  const { root, dataFolder, life, ledger } = place;
  await ensurePostgres(life);
  life.check();
  const database = await keepDatabase(life, ledger, { folder: dataFolder, account: serverAccount() });
  const { cluster } = database;
  life.check();
  await prepareDemoDatabase(cluster, demoDatabase, seedInChild(life, ledger, root, dataFolder));
  life.check();
  const urls = cluster.urls(demoDatabase);
  const environment: Record<string, string> = {
    DATABASE_URL: urls.app,
    PUBLIC_DATABASE_URL: urls.public,
    MIGRATE_DATABASE_URL: urls.owner,
    DATA_DIR: dataFolder,
    FANFOLD_DEMO: "1",
    NEXTAUTH_SECRET: settings.NEXTAUTH_SECRET ?? keptSecret(path.join(dataFolder, "session-secret")),
    NEXTAUTH_URL: settings.NEXTAUTH_URL ?? `http://127.0.0.1:${settings.PORT}`,
  };
  const search: KeptChild[] = [];
  if (settings.SMTP_URL === undefined) {
    const mail = await startMailStandIn(path.join(dataFolder, "mail"));
    life.onStop(() => mail.close());
    environment.SMTP_URL = mail.url;
  }
  if (settings.MEILI_HOST === undefined) {
    environment.MEILI_HOST = `http://127.0.0.1:${await anyFreePort()}`;
    environment.MEILI_API_KEY = randomBytes(24).toString("base64url");
    const standIn = keepChild(life, ledger, {
      name: "search stand-in",
      command: process.execPath,
      args: ["--import", "tsx", "lib/cli/search-stand-in.ts"],
      cwd: root,
      env: childEnvironment({ ...environment, NODE_ENV: "production" }),
    });
    search.push(standIn);
  }
  ledger.tell(environment);
  return {
    environment,
    firstEnd: Promise.race([database.firstEnd, ...search.map(({ firstEnd }) => firstEnd)]),
    broken: Promise.race([database.gaveUp, ...search.map(({ gaveUp }) => gaveUp)]),
  };
}

/** A secret that stays the same over restarts, so that sessions do; only the folder's owner can read it. */
function keptSecret(file: string): string {
  if (existsSync(file)) return readFileSync(file, "utf8").trim();
  const made = randomBytes(48).toString("base64url");
  writeFileSync(file, `${made}\n`, { mode: 0o600, flag: "wx" });
  return made;
}
