import { idParams } from "@/lib/contracts/base";
import { runReadings } from "@/lib/contracts/bench";
import { savedReadings } from "@/lib/contracts/bench-session";
import { reply } from "@/lib/http/reply";
import { route } from "@/lib/http/route";
import { addRunReadings } from "@/lib/server/bench/runs";

/** Adds readings to a run, if nobody changed it in between. */
export const POST = route(
  { access: "signed_in", params: idParams, body: runReadings },
  async ({ actor, params, body, requestId }) =>
    reply(savedReadings.parse(await addRunReadings({ actor, requestId }, { runId: params.id, ...body })), {
      status: 201,
    }),
);
