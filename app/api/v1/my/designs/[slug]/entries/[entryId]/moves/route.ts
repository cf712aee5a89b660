import { entryMade, ownMove, slugEntryParams } from "@/lib/contracts/own-designs";
import { route } from "@/lib/http/route";
import { moveOwnEntry } from "@/lib/server/designs/send-in";

/** Sends a returned entry in again, or withdraws one. */
export const POST = route(
  { access: "signed_in", params: slugEntryParams, body: ownMove },
  async ({ actor, params, body, requestId }) =>
    entryMade.parse(await moveOwnEntry({ actor, requestId }, { ...params, ...body, at: new Date() })),
);
