import { rmSync } from "node:fs";
import { serverAccount } from "@/db/cluster/account";
import { startCluster, throwAwayTuning, type Cluster } from "@/db/cluster/cluster";
import { temporaryFolder } from "./temporary-folder";

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
