import { idParams } from "@/lib/contracts/base";
import { sendBackAnswer, sendBackBody } from "@/lib/contracts/review";
import { route } from "@/lib/http/route";
import { sendBack } from "@/lib/server/review/sign-round";

/** Sends entries of a round in review back to the bench, each with its reason. */
export const POST = route(
  { access: "signed_in", params: idParams, body: sendBackBody },
  async ({ actor, params, body, requestId }) =>
    sendBackAnswer.parse(
      await sendBack(
        { actor, requestId },
        { roundId: params.id, remark: body.note, entries: body.entries, at: new Date() },
      ),
    ),
);
