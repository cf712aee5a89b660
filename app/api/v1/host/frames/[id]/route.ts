import { idParams } from "@/lib/contracts/base";
import { frameFigures } from "@/lib/contracts/frames-admin";
import { route } from "@/lib/http/route";
import { changeFrame } from "@/lib/server/benches/frames";

/** Changes a frame's figures, as long as no opened season and no revision that was sent in uses it. */
export const PUT = route(
  { access: "signed_in", params: idParams, body: frameFigures },
  async ({ actor, params, body, requestId }) =>
    changeFrame({ actor, requestId }, { frameId: params.id, figures: body }),
);
