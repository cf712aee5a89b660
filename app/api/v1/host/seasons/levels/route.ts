import { levelsQuery, levelsTrial } from "@/lib/contracts/seasons-admin";
import { route } from "@/lib/http/route";
import { tryLevels } from "@/lib/server/seasons/try-levels";

/** How many past entries a choice of levels would leave unranked. */
export const GET = route({ access: "signed_in", query: levelsQuery }, async ({ actor, query }) =>
  levelsTrial.parse(await tryLevels(actor, query)),
);
