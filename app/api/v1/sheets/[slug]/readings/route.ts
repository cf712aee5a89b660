import { rawRunsSchema, sheetParams, sheetQuery } from "@/lib/contracts/raw-runs";
import { route } from "@/lib/http/route";
import { readRawRunsPage } from "@/lib/server/reading/sheet-page";

/** Every raw reading behind an entry's figures, superseded ones too. */
export const GET = route({ access: "public", params: sheetParams, query: sheetQuery }, async ({ params, query }) =>
  rawRunsSchema.parse(await readRawRunsPage({ slug: params.slug, entryId: query.entry })),
);
