import { roundEntryParams } from "@/lib/contracts/review";
import { takeOut } from "@/lib/contracts/seasons-admin";
import { route } from "@/lib/http/route";
import { takeOutEntry } from "@/lib/server/seasons/rounds";

/** Takes an entry out of a round before its hour, with a reason. */
export const POST = route(
  { access: "signed_in", params: roundEntryParams, body: takeOut },
  async ({ actor, params, body, requestId }) =>
    takeOutEntry(
      { actor, requestId },
      { roundId: params.id, entryId: params.entryId, reason: body.reason, at: new Date() },
    ),
);
