import { z } from "zod";
import { manyOf, wholeText } from "./base";
import { endNames, facetKeys, parseIndexQuery, rangeKeys, sortKeys } from "./index-query";

const bound = z
  .string()
  .regex(/^-?\d{1,7}(\.\d{1,6})?$/, "is no plain number")
  .optional();

const sorts = sortKeys.flatMap((key) => [key, `-${key}`]);

/** The address's own names and nothing else; programs are told of a slip that a page would pass over. */
const sentShape = {
  q: z.string().max(200, "has more than 200 characters").optional(),
  ...Object.fromEntries(facetKeys.map((facet) => [facet, manyOf(z.string().min(1).max(80), 60)])),
  ...Object.fromEntries(
    rangeKeys.flatMap((range) => {
      const { from, to } = endNames(range);
      return [from, to].map((name) => [name, bound]);
    }),
  ),
  sort: z.enum(sorts, { error: `is none of ${sortKeys.join(", ")} (with - before it for descending)` }).optional(),
  page: wholeText(1, 10_000).optional(),
  columns: z.string().max(400).optional(),
  view: z.enum(["table", "drawings"]).optional(),
};

/** `GET /api/v1/designs`: the same question as the page's address, but every mistake is a problem of its field. */
export const designsQuery = z
  .strictObject(sentShape)
  .superRefine((sent, context) => {
    const said = sent as Readonly<Record<string, unknown>>;
    for (const range of rangeKeys) {
      const { from, to } = endNames(range);
      if (typeof said[from] === "string" && typeof said[to] === "string" && Number(said[from]) > Number(said[to])) {
        context.addIssue({ code: "custom", path: [to], message: `lies below ${from}` });
      }
    }
  })
  .transform((sent) => {
    const params = new URLSearchParams();
    for (const [name, value] of Object.entries(sent)) {
      for (const each of Array.isArray(value) ? value : [value]) {
        if (each !== undefined) params.append(name, String(each));
      }
    }
    return parseIndexQuery(params);
  });
