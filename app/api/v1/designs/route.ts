import { designsQuery } from "@/lib/contracts/designs";
import { indexAnswerSchema } from "@/lib/contracts/index-query";
import { route } from "@/lib/http/route";
import { findDesigns } from "@/lib/server/reading/find-designs";

/** The index: entries that fit, counts of every facet without its own choice, histograms. */
export const GET = route({ access: "public", query: designsQuery }, async ({ query }) =>
  indexAnswerSchema.parse(await findDesigns(query)),
);
