import { idParams } from "@/lib/contracts/base";
import { newPosition } from "@/lib/contracts/bench-admin";
import { made } from "@/lib/contracts/seasons-admin";
import { reply } from "@/lib/http/reply";
import { route } from "@/lib/http/route";
import { addPosition } from "@/lib/server/benches/benches";

/** Adds a microphone position to a bench version. */
export const POST = route(
  { access: "signed_in", params: idParams, body: newPosition },
  async ({ actor, params, body, requestId }) =>
    reply(made.parse(await addPosition({ actor, requestId }, { benchVersionId: params.id, position: body })), {
      status: 201,
    }),
);
