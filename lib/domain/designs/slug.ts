/**
 * An address from a name: lower case, accents dropped, all else than letters and figures made single hyphens, at most
 * 80 characters. A name without any letter or figure gives "".
 */
export function slugOf(name: string): string {
  return name
    .normalize("NFKD")
    .replace(/\p{M}/gu, "")
    .toLowerCase()
    .replace(/[^a-z0-9]+/g, "-")
    .slice(0, 80)
    .replace(/^-+|-+$/g, "");
}
