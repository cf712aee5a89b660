import { newComparison, savedComparison, savedComparisons } from "@/lib/contracts/saved";
import { reply } from "@/lib/http/reply";
import { route } from "@/lib/http/route";
import { readComparisons, saveComparison } from "@/lib/server/saved/comparisons";

/** One's own saved comparisons. */
export const GET = route({ access: "signed_in" }, async ({ actor }) =>
  savedComparisons.parse(await readComparisons(actor)),
);

/** Saves a comparison's address under a name, with a note, shared or not. */
export const POST = route({ access: "signed_in", body: newComparison }, async ({ actor, body }) =>
  reply(savedComparison.parse(await saveComparison(actor, body)), { status: 201 }),
);
