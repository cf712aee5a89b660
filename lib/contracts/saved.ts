import { z } from "zod";
import { compareAddress, compareQuery } from "./compare";
import { id, time } from "./base";
import { indexAddress, parseIndexQuery } from "./index-query";

/** Most of each kind that one person keeps. */
export const savedMost = 500;

const name = z.string().trim().min(1, "is missing").max(120, "has more than 120 characters");
const note = z.string().trim().max(2000, "has more than 2000 characters").default("");
const address = z.string().max(2000, "is too long");

/** Parameters of an address of one page of this site; undefined for any other address. */
function paramsOf(text: string, path: string): URLSearchParams | undefined {
  const base = "http://fanfold.invalid";
  if (!text.startsWith("/") || !URL.canParse(text, base)) return undefined;
  const url = new URL(text, base);
  return url.origin === base && url.pathname === path ? url.searchParams : undefined;
}

/** A comparison's own address, in its one spelling; what it names is looked up by the use-case. */
export const comparisonAddress = address.transform((text, context) => {
  const params = paramsOf(text, "/compare");
  const read = compareQuery.safeParse({
    entries: params?.get("entries") ?? "",
    ...(params?.has("level") && { level: params.get("level") }),
  });
  if (read.success) return compareAddress(read.data.entries, read.data.level);
  context.issues.push({ code: "custom", input: text, message: "is no address of a comparison of one to four entries" });
  return z.NEVER;
});

/** A search of the index in its one spelling, without the page that stood open. */
export const searchAddress = address.transform((text, context) => {
  const params = paramsOf(text, "/designs");
  if (params) return indexAddress({ ...parseIndexQuery(params), page: 1 });
  context.issues.push({ code: "custom", input: text, message: "is no address of the index" });
  return z.NEVER;
});

export const newComparison = z.strictObject({ name, note, address: comparisonAddress, shared: z.boolean() });
export type NewComparison = z.output<typeof newComparison>;

/** Its name, note and whether it is shared, whole; a key that was taken back never comes again. */
export const comparisonChange = z.strictObject({ name, note, shared: z.boolean() });
export type ComparisonChange = z.output<typeof comparisonChange>;

export const savedComparison = z.strictObject({
  id,
  name: z.string(),
  note: z.string(),
  address: z.string(),
  /** Where anybody may read it, or null. */
  sharedAddress: z.string().nullable(),
  createdAt: time,
  updatedAt: time,
});
export type SavedComparison = z.infer<typeof savedComparison>;
export const savedComparisons = z.strictObject({ items: z.array(savedComparison) });

export const shareKeyParams = z.strictObject({ key: z.string().regex(/^[A-Za-z0-9_-]{22,64}$/, "is no key") });

export const sharedComparison = z.strictObject({
  name: z.string(),
  note: z.string(),
  address: z.string(),
  /** The handle of whoever shares it, as it is now. */
  by: z.string(),
  sharedAt: time,
});
export type SharedComparison = z.infer<typeof sharedComparison>;

export const newSearch = z.strictObject({ name, address: searchAddress });
export type NewSearch = z.output<typeof newSearch>;
export const savedSearch = z.strictObject({ id, name: z.string(), address: z.string(), createdAt: time });
export type SavedSearch = z.infer<typeof savedSearch>;
export const savedSearches = z.strictObject({ items: z.array(savedSearch) });
