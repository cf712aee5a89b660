import { reviewEntryReadings, roundEntryParams } from "@/lib/contracts/review";
import { route } from "@/lib/http/route";
import { readEntryForReview } from "@/lib/server/review/read-entry";

/** Every raw reading behind an entry's figures, superseded ones too. */
export const GET = route({ access: "signed_in", params: roundEntryParams }, async ({ actor, params }) =>
  reviewEntryReadings.parse(await readEntryForReview(actor, { roundId: params.id, entryId: params.entryId })),
);
