import { frameFigures } from "@/lib/contracts/frames-admin";
import { made } from "@/lib/contracts/seasons-admin";
import { reply } from "@/lib/http/reply";
import { route } from "@/lib/http/route";
import { addFrame } from "@/lib/server/benches/frames";

/** Adds a frame that seasons may allow and models are compared with. */
export const POST = route({ access: "signed_in", body: frameFigures }, async ({ actor, body, requestId }) =>
  reply(made.parse(await addFrame({ actor, requestId }, body)), { status: 201 }),
);
