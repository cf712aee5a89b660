import { idParams } from "@/lib/contracts/base";
import { made, newRound } from "@/lib/contracts/seasons-admin";
import { reply } from "@/lib/http/reply";
import { route } from "@/lib/http/route";
import { planRound } from "@/lib/server/seasons/rounds";

/** Plans the next round of a season. */
export const POST = route(
  { access: "signed_in", params: idParams, body: newRound },
  async ({ actor, params, body, requestId }) =>
    reply(made.parse(await planRound({ actor, requestId }, { seasonId: params.id, ...body })), { status: 201 }),
);
