import { chmodSync, mkdtempSync, rmSync } from "node:fs";
import os from "node:os";
import path from "node:path";
import { serverAccount } from "@/db/cluster/account";
import { startCluster, throwAwayTuning, type Cluster } from "@/db/cluster/cluster";

/** A folder under the system's temporary one that the database's user can pass through. */
export function temporaryFolder(name: string): string {
  const folder = mkdtempSync(path.join(os.tmpdir(), `fanfold-${name}-`));
  chmodSync(folder, 0o711);
  return folder;
}

/** Starts a database server that is thrown away: `stop()` ends it and deletes its folder. */
export async function temporaryCluster(tuning: Record<string, string> = {}): Promise<Cluster> {
  const folder = temporaryFolder("cluster");
  const remove = () => rmSync(folder, { recursive: true, force: true });
  try {
    const cluster = await startCluster({ folder, account: serverAccount(), tuning: { ...throwAwayTuning, ...tuning } });
    return { ...cluster, stop: () => cluster.stop().finally(remove) };
  } catch (error) {
    remove();
    throw error;
  }
}
