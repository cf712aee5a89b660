import { idParams } from "@/lib/contracts/base";
import { newKeepOutBox } from "@/lib/contracts/keep-outs";
import { made } from "@/lib/contracts/seasons-admin";
import { reply } from "@/lib/http/reply";
import { route } from "@/lib/http/route";
import { addKeepOutBox } from "@/lib/server/benches/keep-outs";

/** Adds a box that a fan must stay clear of to a bench version. */
export const POST = route(
  { access: "signed_in", params: idParams, body: newKeepOutBox },
  async ({ actor, params, body, requestId }) =>
    reply(made.parse(await addKeepOutBox({ actor, requestId }, { benchVersionId: params.id, box: body })), {
      status: 201,
    }),
);
