import { liftInput, liftParams } from "@/lib/contracts/bench";
import { route } from "@/lib/http/route";
import { liftHold } from "@/lib/server/bench/session-readings";

/** Lifts a hold, with a note, by another person. */
export const POST = route(
  { access: "signed_in", params: liftParams, body: liftInput },
  async ({ actor, params, body, requestId }) =>
    liftHold(
      { actor, requestId },
      { sessionId: params.id, holdId: params.holdId, liftNote: body.note, at: new Date() },
    ),
);
