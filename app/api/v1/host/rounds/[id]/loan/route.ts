import { idParams } from "@/lib/contracts/base";
import { lend } from "@/lib/contracts/seasons-admin";
import { route } from "@/lib/http/route";
import { lendRound } from "@/lib/server/seasons/rounds";

/** Lends the review of a round to one member. */
export const PUT = route(
  { access: "signed_in", params: idParams, body: lend },
  async ({ actor, params, body, requestId }) =>
    lendRound({ actor, requestId }, { roundId: params.id, handle: body.handle, at: new Date() }),
);

/** Ends the loan. */
export const DELETE = route({ access: "signed_in", params: idParams }, async ({ actor, params, requestId }) =>
  lendRound({ actor, requestId }, { roundId: params.id, handle: null, at: new Date() }),
);
