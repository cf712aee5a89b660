import { z } from "zod";
import { expectedErrorCodes } from "@/lib/domain/expected-error";

/** Parts that every resource's contract is made of. Requests are strict: a name that nobody knows is a mistake. */
export const id = z.uuid({ error: "is no id" });
export const idParams = z.strictObject({ id });

/** A public address's last part: lower case, digits, single hyphens. */
export const slug = z
  .string()
  .max(80, "has more than 80 characters")
  .regex(/^[a-z0-9]+(-[a-z0-9]+)*$/, "is no address: lower-case letters, digits and single hyphens");
export const slugParams = z.strictObject({ slug });

/** A time as ISO 8601 with its offset, as answers give it. */
export const time = z.iso.datetime({ offset: true });

/** A query parameter that may stand several times: always a list, empty when it is missing. */
export function manyOf<T extends z.ZodType>(item: T, most = 50) {
  return z.preprocess(
    (value) => (value === undefined ? [] : Array.isArray(value) ? value : [value]),
    z.array(item).max(most, `is given more than ${most} times`),
  );
}

/**
 * A whole number in an address. Only digits are taken: an empty parameter is an error and never 0.
 */
export function wholeText(low: number, high: number) {
  return z
    .string()
    .regex(/^-?\d{1,9}$/, "is no whole number")
    .transform(Number)
    .refine((value) => value >= low && value <= high, { error: `must lie from ${low} to ${high}` });
}

/** Paging by a stable key: `after` is the `next` of the page before. */
export const pageQuery = {
  after: z.string().min(1).max(200).optional(),
  limit: wholeText(1, 200).optional(),
};

/** One page of a list; `next` is null on the last page. */
export function pageOf<T extends z.ZodType>(item: T) {
  return z.strictObject({ items: z.array(item), next: z.string().nullable() });
}

/** A request's empty body: `{}`. */
export const nothing = z.strictObject({});

/** The body of every refusal, `application/problem+json` (RFC 9457) with our code, the fields and the request's id. */
export const problemSchema = z.strictObject({
  type: z.string(),
  title: z.string(),
  status: z.int().min(400).max(599),
  detail: z.string(),
  code: z.enum([...expectedErrorCodes, "unexpected"]),
  fields: z.array(z.strictObject({ path: z.string(), message: z.string() })),
  requestId: z.string(),
});
export type Problem = z.infer<typeof problemSchema>;
