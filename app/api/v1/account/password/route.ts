import { changePasswordBody } from "@/lib/contracts/accounts";
import { route } from "@/lib/http/route";
import { changePassword } from "@/lib/server/accounts/password";

/** Changes one's password and ends every session, this one too. */
export const POST = route({ access: "signed_in", body: changePasswordBody }, ({ actor, body, requestId }) =>
  changePassword(actor, body, requestId),
);
