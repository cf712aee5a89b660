import { idParams } from "@/lib/contracts/base";
import { keepRecording as keepSchema, keptRecording } from "@/lib/contracts/bench-recordings";
import { route } from "@/lib/http/route";
import { keepRecording } from "@/lib/server/bench/keep-recording";

/** Keeps what was read from a recording: its reading, its spectrum, and the analysis beside the file. */
export const POST = route(
  { access: "signed_in", params: idParams, body: keepSchema },
  async ({ actor, params, body, requestId }) =>
    keptRecording.parse(
      await keepRecording({ actor, requestId }, { recordingId: params.id, ...body, now: new Date() }),
    ),
);
