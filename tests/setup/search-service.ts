import { Meilisearch } from "meilisearch";
import { startSearchStandIn } from "@/search/stand-in/server";

export type SearchService = { url: string; masterKey: string; client: Meilisearch; close: () => Promise<void> };

/**
 * The search service that contract tests talk to: the one at MEILI_HOST with the master key MEILI_API_KEY when set,
 * else the stand-in, started here on a free port.
 */
export async function openSearchService(): Promise<SearchService> {
  const host = process.env.MEILI_HOST;
  if (host !== undefined && host !== "") {
    const masterKey = process.env.MEILI_API_KEY ?? "";
    return { url: host, masterKey, client: clientOf(host, masterKey), close: async () => {} };
  }
  const masterKey = "contract-tests-master-key";
  const standIn = await startSearchStandIn({ port: 0, masterKey });
  return { url: standIn.url, masterKey, client: clientOf(standIn.url, masterKey), close: standIn.close };
}

export function clientOf(host: string, apiKey: string): Meilisearch {
  return new Meilisearch({ host, apiKey, defaultWaitOptions: { timeout: 30_000, interval: 5 } });
}

let lastName = 0;

/** A name for an index that no other test of this process uses. */
export function freshIndexName(): string {
  lastName += 1;
  return `contract-${process.pid}-${lastName}`;
}
