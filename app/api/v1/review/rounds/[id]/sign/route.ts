import { idParams } from "@/lib/contracts/base";
import { signAnswer, signBody } from "@/lib/contracts/review";
import { route } from "@/lib/http/route";
import { signRound } from "@/lib/server/review/sign-round";

/** Signs a round in review; what was on screen is what is signed, or nothing is. */
export const POST = route(
  { access: "signed_in", params: idParams, body: signBody },
  async ({ actor, params, body, requestId }) =>
    signAnswer.parse(
      await signRound(
        { actor, requestId },
        { roundId: params.id, remark: body.note, expectedSha256: body.expectedSha256, at: new Date() },
      ),
    ),
);
