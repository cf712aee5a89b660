import { designMade, newDesign, ownDesigns } from "@/lib/contracts/own-designs";
import { reply } from "@/lib/http/reply";
import { route } from "@/lib/http/route";
import { makeDesign } from "@/lib/server/designs/make-design";
import { readOwnDesigns } from "@/lib/server/designs/own-designs";

/** One's own designs with the states of their entries. */
export const GET = route({ access: "signed_in" }, async ({ actor }) => ownDesigns.parse(await readOwnDesigns(actor)));

/** Makes a design. */
export const POST = route({ access: "signed_in", body: newDesign }, async ({ actor, body, requestId }) =>
  reply(designMade.parse(await makeDesign({ actor, requestId }, body)), { status: 201 }),
);
