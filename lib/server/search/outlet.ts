import { appDb } from "@/db/client/handles";
import type { Handle } from "@/db/client/connect";
import { createSearchClient, searchAccess } from "@/search/client";

/**
 * From where to where is sent. The sender's key needs, on `designs` and `designs_build_*`: documents.add, documents.get,
 * documents.delete, indexes.get, indexes.create, indexes.delete, indexes.swap, settings.get, settings.update, stats.get
 * and tasks.get. Web processes need search on `designs` alone. The master key is for making these keys.
 */
export interface Outlet {
  db: Handle;
  client: () => ReturnType<typeof createSearchClient>;
}

/** Sending a thousand documents may take a service a while to accept. */
const requestTimeoutMs = 60_000;

/** The application's database and the service of the settings. */
export function outlet(): Outlet {
  return { db: appDb(), client: () => createSearchClient(searchAccess(), requestTimeoutMs) };
}
