import { idParams } from "@/lib/contracts/base";
import { reviewRound } from "@/lib/contracts/review";
import { route } from "@/lib/http/route";
import { readRoundForReview } from "@/lib/server/review/read-round";

/** A round before its hour, with figures, dry standings and what stands in the way of signing. */
export const GET = route({ access: "signed_in", params: idParams }, async ({ actor, params }) =>
  reviewRound.parse(await readRoundForReview(actor, { roundId: params.id })),
);
