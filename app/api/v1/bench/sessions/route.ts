import { startSession as startBody } from "@/lib/contracts/bench";
import { sessionList, sessionListQuery, startedSession } from "@/lib/contracts/bench-session";
import { reply } from "@/lib/http/reply";
import { route } from "@/lib/http/route";
import { readSessions } from "@/lib/server/bench/read-session";
import { startSession } from "@/lib/server/bench/sessions";

/** Sessions, the newest first. */
export const GET = route({ access: "signed_in", query: sessionListQuery }, async ({ actor, query }) =>
  sessionList.parse(await readSessions(actor, { ...query, open: query.open === "true" })),
);

/** Starts a session of a round, with every caution ticked. */
export const POST = route({ access: "signed_in", body: startBody }, async ({ actor, body, requestId }) =>
  reply(startedSession.parse(await startSession({ actor, requestId }, body, new Date())), { status: 201 }),
);
