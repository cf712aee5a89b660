import { idParams } from "@/lib/contracts/base";
import { newRun } from "@/lib/contracts/bench";
import { savedRun } from "@/lib/contracts/bench-session";
import { reply } from "@/lib/http/reply";
import { route } from "@/lib/http/route";
import { addRun } from "@/lib/server/bench/runs";

/** Adds a run, one mount at one set speed, with what was read so far. */
export const POST = route(
  { access: "signed_in", params: idParams, body: newRun },
  async ({ actor, params, body, requestId }) =>
    reply(savedRun.parse(await addRun({ actor, requestId }, { sessionId: params.id, ...body })), { status: 201 }),
);
