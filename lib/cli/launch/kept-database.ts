import { startCluster, type Cluster, type ClusterOptions } from "@/db/cluster/cluster";
import { bearEnds } from "./borne-ends";
import type { LaunchLedger } from "./ledger";
import type { Lifetime } from "./lifetime";

export interface KeptDatabase {
  cluster: Cluster;
  /** Resolves with what happened when the server ends by itself for the first time. */
  firstEnd: Promise<string>;
  /** Resolves with what happened once it can't be started again. */
  gaveUp: Promise<string>;
}

/** Starts the local database, and again at the same port whenever its server ends by itself: it recovers from its log. */
export async function keepDatabase(
  life: Lifetime,
  ledger: LaunchLedger,
  options: ClusterOptions,
): Promise<KeptDatabase> {
  const first = await startCluster(options);
  let running = first;
  ledger.add(first.pid, "database");
  life.onStop(() => running.stop());
  const again = bearEnds();
  const keep = async (): Promise<string> => {
    for (;;) {
      await running.ended;
      if (life.stopping || !again()) return "The database ended.";
      console.error("The database ended. It is started again.");
      running = await startCluster(options);
      ledger.add(running.pid, "database");
      if (running.port !== first.port) return `The database's port, ${first.port}, was taken meanwhile.`;
      // The stop that was registered may have found the one before.
      if (life.stopping) await running.stop();
    }
  };
  return {
    cluster: first,
    firstEnd: first.ended.then(() => "The database ended."),
    gaveUp: keep().catch((error: unknown) => `The database can't be started again: ${String(error)}`),
  };
}
