import type { EntryName } from "@/lib/domain/designs/entry-token";
import type { Handle } from "../../client/connect";

export type NamedEntry = EntryName & { entryId: string; name: string; seasonTitle: string };

const columns = {
  entryId: "entry_id",
  slug: "design_slug",
  name: "design_name",
  letter: "revision_letter",
  seasonSlug: "season_slug",
  seasonTitle: "season_title",
} as const;

/** Public entries by their names in addresses; any order, what isn't public left out. */
export async function entriesByNames(db: Handle, { names }: { names: readonly EntryName[] }): Promise<NamedEntry[]> {
  if (names.length === 0) return [];
  return db("shown.entry")
    .whereIn(
      ["design_slug", "revision_letter", "season_slug"],
      names.map(({ slug, letter, seasonSlug }) => [slug, letter, seasonSlug]),
    )
    .select(columns);
}

/** Public entries by id, with their names in addresses; any order, what isn't public left out. */
export async function namesOfEntries(db: Handle, { entryIds }: { entryIds: readonly string[] }): Promise<NamedEntry[]> {
  if (entryIds.length === 0) return [];
  return db("shown.entry")
    .whereIn("entry_id", [...entryIds])
    .select(columns);
}
