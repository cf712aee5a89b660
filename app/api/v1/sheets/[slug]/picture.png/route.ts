import { sheetParams, sheetQuery } from "@/lib/contracts/raw-runs";
import { route } from "@/lib/http/route";
import { sharePicture } from "@/lib/server/pictures/share-picture";

const limits = [{ name: "picture", max: 120, windowS: 60, by: "address" }] as const;

/** The picture that stands beside a link to a sheet, 1200 × 630 px. */
export const GET = route(
  { access: "public", params: sheetParams, query: sheetQuery, limits },
  async ({ params, query }) =>
    new Response(await sharePicture({ slug: params.slug, entryId: query.entry }), {
      headers: {
        "content-type": "image/png",
        // Soon enough gone where the design is withdrawn or corrected.
        "cache-control": "public, max-age=300",
        "x-content-type-options": "nosniff",
        "cross-origin-resource-policy": "cross-origin",
      },
    }),
);
