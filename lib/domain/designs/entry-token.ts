/** What names an entry in an address: a revision of a design in a season, such as `heronwing.b.season-4`. */
export type EntryName = { readonly slug: string; readonly letter: string; readonly seasonSlug: string };

/** Slugs have no points, so that a point parts them. The letter is written small, as addresses are. */
export function entryToken({ slug, letter, seasonSlug }: EntryName): string {
  return `${slug}.${letter.toLowerCase()}.${seasonSlug}`;
}

const slugPattern = "[a-z0-9]+(?:-[a-z0-9]+)*";
const token = new RegExp(`^(${slugPattern})[.:]([a-z]{1,3})[.:](${slugPattern})$`, "i");

/** The name back from an address, in any case and with points or colons; undefined where it is none. */
export function parseEntryToken(text: string): EntryName | undefined {
  const [, slug, letter, seasonSlug] = token.exec(text.trim()) ?? [];
  if (slug === undefined || letter === undefined || seasonSlug === undefined || text.length > 200) return undefined;
  return { slug: slug.toLowerCase(), letter: letter.toUpperCase(), seasonSlug: seasonSlug.toLowerCase() };
}
