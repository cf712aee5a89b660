import { idParams } from "@/lib/contracts/base";
import { askedRecording, benchRecordings, newRecording } from "@/lib/contracts/bench-recordings";
import { reply } from "@/lib/http/reply";
import { route } from "@/lib/http/route";
import { askRecording, readRecordings } from "@/lib/server/bench/recordings";

/** Recordings of a session, each with how far its reading is. */
export const GET = route({ access: "signed_in", params: idParams }, async ({ actor, params }) =>
  benchRecordings.parse(await readRecordings(actor, { sessionId: params.id })),
);

/** Asks for a recording that was sent to be read; a job reads it, so the answer is 202. */
export const POST = route(
  {
    access: "signed_in",
    params: idParams,
    body: newRecording,
    limits: [{ name: "bench-recording", max: 120, windowS: 60 }],
  },
  async ({ actor, params, body, requestId }) =>
    reply(askedRecording.parse(await askRecording({ actor, requestId }, { sessionId: params.id, ...body })), {
      status: 202,
    }),
);
