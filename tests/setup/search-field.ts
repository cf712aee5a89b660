import type { Knex } from "knex";
import { seedBench } from "@/db/seeds/demo/seed-bench";
import { seedPeople } from "@/db/seeds/demo/seed-people";
import { fillField } from "@/lib/cli/demo/fill/fill-field";
import type { Outlet } from "@/lib/server/search/outlet";
import { takeTurn } from "@/lib/server/search/sender";
import { createSearchClient } from "@/search/client";
import { DESIGNS_INDEX } from "@/search/settings";

/** Lays out so many invented published entries in a migrated database. */
export async function layOutField(owner: Knex, entries: number): Promise<void> {
  await seedPeople(owner, "no password");
  await seedBench(owner);
  await fillField(owner, { entries });
}

/** From a test's database to a test's search service. */
export function outletOf(db: Knex, host: string, apiKey: string): Outlet {
  return { db, client: () => createSearchClient({ host, apiKey }) };
}

/** Lets the sender do all there is to do. */
export async function settle(from: Outlet): Promise<void> {
  for (let turns = 0; turns < 200; turns += 1) if ((await takeTurn(from)) === "idle") return;
  throw new Error("the sender found no end");
}

/** Ids in the index that readers search. */
export async function indexedIds({ client }: Outlet): Promise<string[]> {
  const { results } = await client()
    .index<{ id: string }>(DESIGNS_INDEX)
    .getDocuments({ limit: 10_000, fields: ["id"] });
  return results.map(({ id }) => id).sort();
}
