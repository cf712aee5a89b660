import { idParams } from "@/lib/contracts/base";
import { newBaselineUnit } from "@/lib/contracts/bench-admin";
import { made } from "@/lib/contracts/seasons-admin";
import { reply } from "@/lib/http/reply";
import { route } from "@/lib/http/route";
import { addBaselineUnit } from "@/lib/server/benches/benches";

/** Adds a unit of a baseline, by serial. */
export const POST = route(
  { access: "signed_in", params: idParams, body: newBaselineUnit },
  async ({ actor, params, body, requestId }) =>
    reply(made.parse(await addBaselineUnit({ actor, requestId }, { baselineId: params.id, ...body })), { status: 201 }),
);
