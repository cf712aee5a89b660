import path from "node:path";
import { serverAccount } from "@/db/cluster/account";
import { chooseDataFolder } from "@/db/cluster/folder";
import { adoptEnvironment, env, requiredEnv } from "@/lib/env/env";
import { toldBy } from "./ledger";

const root = path.resolve(import.meta.dirname, "../../..");

/**
 * For commands run beside `npm start`: where no database is set, the one of the demo that runs from this clone, and its
 * other services, become the settings of this process.
 *
 * @throws when none is set and none runs
 */
export function adoptRunningDemo(): void {
  const { DATABASE_URL, DATA_DIR } = env();
  if (DATABASE_URL !== undefined) return;
  const told = toldBy(chooseDataFolder(root, serverAccount(), DATA_DIR).folder);
  if (!told)
    throw new Error("DATABASE_URL is not set and no demo runs here. Run npm start, leave it running, and try again.");
  adoptEnvironment(told);
}

/** The schema owner's address: as set, or that of the demo that runs from this clone. @throws when there is neither */
export function ownerUrl(): string {
  if (env().MIGRATE_DATABASE_URL === undefined) adoptRunningDemo();
  return requiredEnv("MIGRATE_DATABASE_URL");
}
