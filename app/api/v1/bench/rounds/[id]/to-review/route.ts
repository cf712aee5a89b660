import { idParams, nothing } from "@/lib/contracts/base";
import { movedRound } from "@/lib/contracts/bench-prints";
import { route } from "@/lib/http/route";
import { roundToReview } from "@/lib/server/bench/round-to-review";

/** Hands a round over to review, once each of its entries is there. */
export const POST = route(
  { access: "signed_in", params: idParams, body: nothing },
  async ({ actor, params, requestId }) =>
    movedRound.parse(await roundToReview({ actor, requestId }, { roundId: params.id, at: new Date() })),
);
