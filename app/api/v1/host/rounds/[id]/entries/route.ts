import { idParams } from "@/lib/contracts/base";
import { roundEntries } from "@/lib/contracts/seasons-admin";
import { route } from "@/lib/http/route";
import { addRoundEntries } from "@/lib/server/seasons/rounds";

/** Puts accepted entries into a round that is planned or being measured. */
export const POST = route(
  { access: "signed_in", params: idParams, body: roundEntries },
  async ({ actor, params, body, requestId }) =>
    addRoundEntries({ actor, requestId }, { roundId: params.id, entryIds: body.entryIds }),
);
