import { publicDb } from "@/db/client/handles";
import { entriesByNames, namesOfEntries, type NamedEntry } from "@/db/queries/shown/entry-names";
import { entryToken, parseEntryToken } from "@/lib/domain/designs/entry-token";

export type FoundEntry = NamedEntry & { token: string };
/** `missing` counts what named nothing public; an entry named twice is found once and misses nothing. */
export type FoundEntries = { entries: FoundEntry[]; missing: number };

const uuid = /^[0-9a-f]{8}(-[0-9a-f]{4}){3}-[0-9a-f]{12}$/i;

/**
 * The public entries that an address names, by id or as `heronwing.b.season-4`, in the address's order and each once.
 * What can't be read, was never published or is withdrawn is left out alike, so that nothing tells which it was.
 */
export async function findEntries({ named }: { named: readonly string[] }): Promise<FoundEntries> {
  const db = publicDb();
  const ids = named.filter((text) => uuid.test(text));
  const [byName, byId] = await Promise.all([
    entriesByNames(db, { names: named.flatMap((text) => parseEntryToken(text) ?? []) }),
    namesOfEntries(db, { entryIds: ids }),
  ]);
  const known = new Map<string, NamedEntry>([
    ...byName.map((entry) => [entryToken(entry), entry] as const),
    ...byId.map((entry) => [entry.entryId, entry] as const),
  ]);
  const found = named.map((text) => {
    const parsed = parseEntryToken(text);
    return known.get(parsed ? entryToken(parsed) : text.toLowerCase());
  });
  const entries = found.flatMap((entry) =>
    entry ? [[entry.entryId, { ...entry, token: entryToken(entry) }] as const] : [],
  );
  return { entries: [...new Map(entries).values()], missing: found.filter((entry) => !entry).length };
}
