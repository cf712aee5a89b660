import { appDb } from "@/db/client/handles";
import { deleteSaved, insertSearch, searchRows, type SavedSearchRow } from "@/db/queries/saved";
import type { NewSearch, SavedSearch } from "@/lib/contracts/saved";
import type { Actor } from "@/lib/domain/accounts/actor";
import { ExpectedError } from "@/lib/domain/expected-error";
import { demand } from "../permission";
import { demandRoom } from "./comparisons";

const view = (row: SavedSearchRow): SavedSearch => ({ ...row, createdAt: row.createdAt.toISOString() });

/** One's own saved searches of the index, the newest first. */
export async function readSearches(actor: Actor): Promise<{ items: SavedSearch[] }> {
  demand(actor, "comparison.own");
  return { items: (await searchRows(appDb(), { personId: actor.personId })).map(view) };
}

/** @throws ExpectedError too_many beyond what one person keeps */
export async function saveSearch(actor: Actor, { name, address }: NewSearch): Promise<SavedSearch> {
  demand(actor, "comparison.own");
  await demandRoom("saved_search", actor.personId);
  return view(await insertSearch(appDb(), { personId: actor.personId, name, address }));
}

/** @throws ExpectedError not_found for another's as for none */
export async function deleteSearch(actor: Actor, { id }: { id: string }): Promise<void> {
  demand(actor, "comparison.own");
  if (await deleteSaved(appDb(), { table: "saved_search", personId: actor.personId, id })) return;
  throw new ExpectedError("not_found", "You saved no such search.");
}
