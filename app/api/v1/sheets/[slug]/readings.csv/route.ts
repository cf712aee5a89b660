import { sheetParams, sheetQuery } from "@/lib/contracts/raw-runs";
import { route } from "@/lib/http/route";
import { readingsCsv } from "@/lib/server/reading/readings-csv";

/** The same readings as a table for spreadsheets. */
export const GET = route({ access: "public", params: sheetParams, query: sheetQuery }, async ({ params, query }) => {
  const { name, text } = await readingsCsv({ slug: params.slug, entryId: query.entry });
  return new Response(text, {
    headers: {
      "content-type": "text/csv; charset=utf-8",
      "content-disposition": `attachment; filename="${name}"`,
      "cache-control": "private, no-store",
      "x-content-type-options": "nosniff",
    },
  });
});
