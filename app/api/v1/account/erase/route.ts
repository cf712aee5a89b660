import { eraseBody } from "@/lib/contracts/accounts";
import { route } from "@/lib/http/route";
import { eraseAccount } from "@/lib/server/accounts/leave";

/** Closes one's account and cuts its name. */
export const POST = route({ access: "signed_in", body: eraseBody }, ({ actor, body, requestId }) =>
  eraseAccount(actor, body, requestId),
);
