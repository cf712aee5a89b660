import { idParams } from "@/lib/contracts/base";
import { documentedAnswer, documentedChange } from "@/lib/contracts/control";
import { reply } from "@/lib/http/reply";
import { route } from "@/lib/http/route";
import { documentChange } from "@/lib/server/baselines/document-change";

/** Documents a change at a bench: from a session on its control charts begin a new phase. */
export const POST = route(
  { access: "signed_in", params: idParams, body: documentedChange },
  async ({ actor, params, body, requestId }) => {
    const asked = { actor, requestId };
    const made = await documentChange(asked, { benchVersionId: params.id, at: new Date(), ...body });
    return reply(documentedAnswer.parse(made), { status: 201 });
  },
);
