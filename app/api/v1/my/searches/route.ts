import { newSearch, savedSearch, savedSearches } from "@/lib/contracts/saved";
import { reply } from "@/lib/http/reply";
import { route } from "@/lib/http/route";
import { readSearches, saveSearch } from "@/lib/server/saved/searches";

/** One's own saved searches of the index. */
export const GET = route({ access: "signed_in" }, async ({ actor }) => savedSearches.parse(await readSearches(actor)));

/** Saves the index's address under a name. */
export const POST = route({ access: "signed_in", body: newSearch }, async ({ actor, body }) =>
  reply(savedSearch.parse(await saveSearch(actor, body)), { status: 201 }),
);
