import { idParams, time } from "@/lib/contracts/base";
import { publishBody } from "@/lib/contracts/seasons-admin";
import { reply } from "@/lib/http/reply";
import { route } from "@/lib/http/route";
import { scheduleRound } from "@/lib/server/publishing/schedule";
import { wakePublisher } from "@/lib/server/publishing/wake";

/** Sets the hour of a signed round, or publishes it now; the worker does it, so the answer is 202. */
export const POST = route(
  { access: "signed_in", params: idParams, body: publishBody },
  async ({ actor, params, body, requestId }) => {
    const at = body.publishAt === null ? null : new Date(body.publishAt);
    const hour = await scheduleRound({ actor, requestId }, { roundId: params.id, publishAt: at, now: new Date() });
    if (at === null) await wakePublisher();
    return reply({ publishAt: time.parse(hour.publishAt.toISOString()) }, { status: 202 });
  },
);
