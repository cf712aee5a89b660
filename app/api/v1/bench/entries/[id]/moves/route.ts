import { idParams } from "@/lib/contracts/base";
import { benchMove, movedEntry } from "@/lib/contracts/bench-prints";
import { route } from "@/lib/http/route";
import { moveAtBench } from "@/lib/server/bench/entry-moves";

/** Moves an entry at the bench: to print, to the bench, to review. */
export const POST = route(
  { access: "signed_in", params: idParams, body: benchMove },
  async ({ actor, params, body, requestId }) =>
    movedEntry.parse(await moveAtBench({ actor, requestId }, { entryId: params.id, at: new Date(), ...body })),
);
