import { slugParams } from "@/lib/contracts/base";
import { entryMade, sendIn as sendInBody } from "@/lib/contracts/own-designs";
import { reply } from "@/lib/http/reply";
import { route } from "@/lib/http/route";
import { sendIn } from "@/lib/server/designs/send-in";

/** Sends a revision in to an open season. */
export const POST = route(
  { access: "signed_in", params: slugParams, body: sendInBody },
  async ({ actor, params, body, requestId }) =>
    reply(entryMade.parse(await sendIn({ actor, requestId }, { slug: params.slug, ...body, at: new Date() })), {
      status: 201,
    }),
);
