import { slugParams } from "@/lib/contracts/base";
import { ownDesign } from "@/lib/contracts/own-designs";
import { route } from "@/lib/http/route";
import { readOwnDesign } from "@/lib/server/designs/own-designs";

/** One of one's own designs: states, never figures before the hour. */
export const GET = route({ access: "signed_in", params: slugParams }, async ({ actor, params }) =>
  ownDesign.parse(await readOwnDesign(actor, params)),
);
