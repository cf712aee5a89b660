import { shareKeyParams, sharedComparison } from "@/lib/contracts/saved";
import { route } from "@/lib/http/route";
import { readSharedComparison } from "@/lib/server/saved/comparisons";

/** What a share link opens: a name, a note and the comparison's address. */
export const GET = route({ access: "public", params: shareKeyParams }, async ({ params }) =>
  sharedComparison.parse(await readSharedComparison(params)),
);
