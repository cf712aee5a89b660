import { idParams } from "@/lib/contracts/base";
import { route } from "@/lib/http/route";
import { cancelRecording, readRecording } from "@/lib/server/bench/recordings";

/** One recording: how far its reading is, and what it says. */
export const GET = route({ access: "signed_in", params: idParams }, ({ actor, params }) =>
  readRecording(actor, { recordingId: params.id }),
);

/** Breaks its reading off. */
export const DELETE = route({ access: "signed_in", params: idParams }, ({ actor, params, requestId }) =>
  cancelRecording({ actor, requestId }, { recordingId: params.id, now: new Date() }),
);
