import { idParams } from "@/lib/contracts/base";
import { supersede } from "@/lib/contracts/bench";
import { savedReading } from "@/lib/contracts/bench-session";
import { reply } from "@/lib/http/reply";
import { route } from "@/lib/http/route";
import { supersedeReading } from "@/lib/server/bench/session-readings";

/** Supersedes one reading by another; the old one stays beside it. */
export const POST = route(
  { access: "signed_in", params: idParams, body: supersede },
  async ({ actor, params, body, requestId }) =>
    reply(savedReading.parse(await supersedeReading({ actor, requestId }, { readingId: params.id, ...body })), {
      status: 201,
    }),
);
