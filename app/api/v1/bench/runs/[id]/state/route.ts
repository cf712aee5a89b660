import { idParams } from "@/lib/contracts/base";
import { runState } from "@/lib/contracts/bench";
import { savedVersion } from "@/lib/contracts/bench-session";
import { route } from "@/lib/http/route";
import { setRunState } from "@/lib/server/bench/runs";

/** Says that a run is done, held, discarded or open again. */
export const PUT = route(
  { access: "signed_in", params: idParams, body: runState },
  async ({ actor, params, body, requestId }) =>
    savedVersion.parse(await setRunState({ actor, requestId }, { runId: params.id, ...body })),
);
