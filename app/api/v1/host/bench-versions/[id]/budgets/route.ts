import { idParams } from "@/lib/contracts/base";
import { newBudget } from "@/lib/contracts/bench-admin";
import { made } from "@/lib/contracts/seasons-admin";
import { reply } from "@/lib/http/reply";
import { route } from "@/lib/http/route";
import { addBudget } from "@/lib/server/benches/benches";

/** Writes a new version of a bench's uncertainty budget, with its parts where they come with it. */
export const POST = route(
  { access: "signed_in", params: idParams, body: newBudget },
  async ({ actor, params, body, requestId }) =>
    reply(made.parse(await addBudget({ actor, requestId }, { benchVersionId: params.id, ...body })), { status: 201 }),
);
