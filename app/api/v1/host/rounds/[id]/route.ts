import { idParams } from "@/lib/contracts/base";
import { hostRound } from "@/lib/contracts/seasons-admin";
import { route } from "@/lib/http/route";
import { readHostRound } from "@/lib/server/seasons/read-round";

/** A round as its host runs it: states and no figure. */
export const GET = route({ access: "signed_in", params: idParams }, async ({ actor, params }) =>
  hostRound.parse(await readHostRound(actor, { roundId: params.id })),
);
