import { idParams } from "@/lib/contracts/base";
import { seasonMove } from "@/lib/contracts/seasons-admin";
import { route } from "@/lib/http/route";
import { moveSeason } from "@/lib/server/seasons/seasons";

/** Opens or closes a season. */
export const POST = route(
  { access: "signed_in", params: idParams, body: seasonMove },
  async ({ actor, params, body, requestId }) =>
    moveSeason({ actor, requestId }, { seasonId: params.id, to: body.to, at: new Date() }),
);
