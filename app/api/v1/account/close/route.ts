import { closeBody } from "@/lib/contracts/accounts";
import { route } from "@/lib/http/route";
import { closeAccount } from "@/lib/server/accounts/leave";

/** Closes one's account. */
export const POST = route({ access: "signed_in", body: closeBody }, ({ actor, body, requestId }) =>
  closeAccount(actor, body, requestId),
);
