import { idParams } from "@/lib/contracts/base";
import { sessionReading } from "@/lib/contracts/bench";
import { savedReading } from "@/lib/contracts/bench-session";
import { reply } from "@/lib/http/reply";
import { route } from "@/lib/http/route";
import { addSessionReading } from "@/lib/server/bench/session-readings";

/** Keeps a reading of the session itself: calibrator, background, the air. */
export const POST = route(
  { access: "signed_in", params: idParams, body: sessionReading },
  async ({ actor, params, body, requestId }) => {
    const made = await addSessionReading({ actor, requestId }, { sessionId: params.id, reading: body });
    return reply(savedReading.parse(made), { status: 201 });
  },
);
