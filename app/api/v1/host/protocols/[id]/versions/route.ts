import { idParams } from "@/lib/contracts/base";
import { newProtocolVersion } from "@/lib/contracts/bench-admin";
import { made } from "@/lib/contracts/seasons-admin";
import { reply } from "@/lib/http/reply";
import { route } from "@/lib/http/route";
import { addProtocolVersion } from "@/lib/server/benches/benches";

/** Adds a version of a protocol. */
export const POST = route(
  { access: "signed_in", params: idParams, body: newProtocolVersion },
  async ({ actor, params, body, requestId }) =>
    reply(made.parse(await addProtocolVersion({ actor, requestId }, { protocolId: params.id, version: body })), {
      status: 201,
    }),
);
