import { confirmTraits, revisionParams } from "@/lib/contracts/revision-files";
import { route } from "@/lib/http/route";
import { confirmRevisionTraits } from "@/lib/server/designs/confirm-traits";

/** Confirms the traits of a draft of one's own: for each, what was read holds or what is declared. */
export const PUT = route(
  { access: "signed_in", params: revisionParams, body: confirmTraits },
  ({ actor, params, body, requestId }) => confirmRevisionTraits({ actor, requestId }, params, body),
);
