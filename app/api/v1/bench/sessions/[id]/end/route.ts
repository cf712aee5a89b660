import { idParams, nothing } from "@/lib/contracts/base";
import { endedSession } from "@/lib/contracts/bench-session";
import { route } from "@/lib/http/route";
import { endSession } from "@/lib/server/bench/sessions";

/** Ends a session: its gates are tried, and each finding holds it. */
export const POST = route(
  { access: "signed_in", params: idParams, body: nothing },
  async ({ actor, params, requestId }) =>
    endedSession.parse(await endSession({ actor, requestId }, { sessionId: params.id, at: new Date() })),
);
