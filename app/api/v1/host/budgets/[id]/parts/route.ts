import { idParams } from "@/lib/contracts/base";
import { newBudgetPart } from "@/lib/contracts/bench-admin";
import { made } from "@/lib/contracts/seasons-admin";
import { reply } from "@/lib/http/reply";
import { route } from "@/lib/http/route";
import { addBudgetPart } from "@/lib/server/benches/benches";

/** Adds a part to a budget that isn't frozen. */
export const POST = route(
  { access: "signed_in", params: idParams, body: newBudgetPart },
  async ({ actor, params, body, requestId }) =>
    reply(made.parse(await addBudgetPart({ actor, requestId }, { budgetId: params.id, part: body })), { status: 201 }),
);
