import { idParams } from "@/lib/contracts/base";
import { personItem, roleBody } from "@/lib/contracts/people";
import { route } from "@/lib/http/route";
import { changeRole } from "@/lib/server/accounts/people";

/** Gives, changes or takes a role; the person's sessions end. */
export const PUT = route(
  { access: "signed_in", params: idParams, body: roleBody },
  async ({ actor, params, body, requestId }) =>
    personItem.parse(await changeRole(actor, { personId: params.id, ...body }, requestId)),
);
