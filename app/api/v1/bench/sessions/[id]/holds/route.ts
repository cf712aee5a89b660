import { idParams } from "@/lib/contracts/base";
import { holdInput } from "@/lib/contracts/bench";
import { route } from "@/lib/http/route";
import { holdSession } from "@/lib/server/bench/session-readings";

/** Holds a session by hand, with a reason. */
export const POST = route(
  { access: "signed_in", params: idParams, body: holdInput },
  async ({ actor, params, body, requestId }) =>
    holdSession({ actor, requestId }, { sessionId: params.id, reason: body.reason, at: new Date() }),
);
