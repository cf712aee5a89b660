import { idParams } from "@/lib/contracts/base";
import { listenedRecording } from "@/lib/contracts/bench-recordings";
import { route } from "@/lib/http/route";
import { tickListened } from "@/lib/server/bench/recording-file";

/** Notes that this person listened to a recording and heard no voices. */
export const PUT = route(
  { access: "signed_in", params: idParams, body: listenedRecording },
  ({ actor, params, requestId }) => tickListened({ actor, requestId }, { recordingId: params.id, now: new Date() }),
);
