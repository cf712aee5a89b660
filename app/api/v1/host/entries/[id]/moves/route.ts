import { idParams } from "@/lib/contracts/base";
import { entryMoved, hostEntryMove } from "@/lib/contracts/entries";
import { route } from "@/lib/http/route";
import { moveEntryByHost } from "@/lib/server/seasons/move-entry";

/** Moves an entry as the host: accept, return, decline, carry over, measure again, withdraw. */
export const POST = route(
  { access: "signed_in", params: idParams, body: hostEntryMove },
  async ({ actor, params, body, requestId }) =>
    entryMoved.parse(await moveEntryByHost({ actor, requestId }, { entryId: params.id, move: body, at: new Date() })),
);
