/**
 * JSON with the keys of every object in code-unit order and no white space, so that equal data gives equal text (the
 * ordering of RFC 8785, 3.2.3; numbers as ECMAScript writes them, 3.2.2.3). Undefined members are left out.
 * @throws TypeError for a number that isn't finite: it has no JSON
 */
export function canonicalJson(value: unknown): string {
  return JSON.stringify(value, (_key, item: unknown) => {
    if (typeof item === "number" && !Number.isFinite(item))
      throw new TypeError("a number that is not finite has no JSON");
    if (item === null || typeof item !== "object" || Array.isArray(item)) return item;
    return Object.fromEntries(Object.entries(item).sort(([a], [b]) => (a < b ? -1 : a > b ? 1 : 0)));
  });
}
