import { idParams } from "@/lib/contracts/base";
import { sessionChange } from "@/lib/contracts/bench";
import { benchSession, savedVersion } from "@/lib/contracts/bench-session";
import { route } from "@/lib/http/route";
import { readSession } from "@/lib/server/bench/read-session";
import { editSession } from "@/lib/server/bench/sessions";

/** All of one session as it stands: runs, readings, checks, holds, figures so far. */
export const GET = route({ access: "signed_in", params: idParams }, async ({ actor, params }) =>
  benchSession.parse(await readSession(actor, { sessionId: params.id })),
);

/** Changes the note or the checklist of an open session. */
export const PATCH = route(
  { access: "signed_in", params: idParams, body: sessionChange },
  async ({ actor, params, body, requestId }) =>
    savedVersion.parse(await editSession({ actor, requestId }, { sessionId: params.id, ...body })),
);
