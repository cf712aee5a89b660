import { idParams } from "@/lib/contracts/base";
import { logAnswer, logQuery } from "@/lib/contracts/bench-logs";
import { route } from "@/lib/http/route";
import { takeLog } from "@/lib/server/bench/logs";

/** Reads a log that is put to a run (text/csv, up to 64 MB); with `commit=yes` keeps it and adds its reading. */
export const POST = route(
  {
    access: "signed_in",
    params: idParams,
    query: logQuery,
    body: "raw",
    limits: [{ name: "bench-log", max: 120, windowS: 60 }],
  },
  async ({ actor, params, query, request, requestId }) =>
    logAnswer.parse(await takeLog({ actor, requestId }, { sessionId: params.id, query, request })),
);
