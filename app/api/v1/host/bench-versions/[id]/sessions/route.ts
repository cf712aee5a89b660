import { idParams } from "@/lib/contracts/base";
import { startedSession } from "@/lib/contracts/bench-session";
import { startBenchSession as startBody } from "@/lib/contracts/control";
import { reply } from "@/lib/http/reply";
import { route } from "@/lib/http/route";
import { startBenchSession } from "@/lib/server/baselines/start-bench-session";

/** Starts a session that qualifies a bench version or bridges two baseline units, with every caution ticked. */
export const POST = route(
  { access: "signed_in", params: idParams, body: startBody },
  async ({ actor, params, body, requestId }) => {
    const asked = { actor, requestId };
    const started = await startBenchSession(asked, { benchVersionId: params.id, at: new Date(), ...body });
    return reply(startedSession.parse(started), { status: 201 });
  },
);
