import { slugParams } from "@/lib/contracts/base";
import { newRevision, revisionMade } from "@/lib/contracts/own-designs";
import { reply } from "@/lib/http/reply";
import { route } from "@/lib/http/route";
import { addRevision } from "@/lib/server/designs/make-design";

/** Adds the next revision with its declared traits. */
export const POST = route(
  { access: "signed_in", params: slugParams, body: newRevision },
  async ({ actor, params, body, requestId }) =>
    reply(revisionMade.parse(await addRevision({ actor, requestId }, { slug: params.slug, revision: body })), {
      status: 201,
    }),
);
