import { compareQuery } from "@/lib/contracts/compare";
import { route } from "@/lib/http/route";
import { compareAnswer } from "@/lib/server/reading/compare-answer";
import { compareCsv } from "@/lib/server/reading/compare-csv";

/** The same comparison as a table for spreadsheets. */
export const GET = route({ access: "public", query: compareQuery }, async ({ query }) => {
  const text = compareCsv(await compareAnswer({ named: query.entries, levelDba: query.level }));
  return new Response(text, {
    headers: {
      "content-type": "text/csv; charset=utf-8",
      "content-disposition": 'attachment; filename="fanfold-compare.csv"',
      "cache-control": "private, no-store",
      "x-content-type-options": "nosniff",
    },
  });
});
