import { idParams } from "@/lib/contracts/base";
import { hostSeason, seasonChange } from "@/lib/contracts/seasons-admin";
import { route } from "@/lib/http/route";
import { changeSeason, readHostSeason } from "@/lib/server/seasons/seasons";

/** A season with its rounds, for the host. */
export const GET = route({ access: "signed_in", params: idParams }, async ({ actor, params }) =>
  hostSeason.parse(await readHostSeason(actor, { seasonId: params.id })),
);

/** Changes a season; what is frozen answers 409. */
export const PUT = route(
  { access: "signed_in", params: idParams, body: seasonChange },
  async ({ actor, params, body, requestId }) =>
    changeSeason({ actor, requestId }, { seasonId: params.id, season: body }),
);
