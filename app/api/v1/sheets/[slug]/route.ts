import { sheetParams, sheetQuery } from "@/lib/contracts/raw-runs";
import { route } from "@/lib/http/route";
import { readSheetPage } from "@/lib/server/reading/sheet-page";

/** A design's sheet: the newest public entry, or the one asked for. */
export const GET = route({ access: "public", params: sheetParams, query: sheetQuery }, async ({ params, query }) =>
  readSheetPage({ slug: params.slug, entryId: query.entry }),
);
