import { resetBody } from "@/lib/contracts/accounts";
import { route } from "@/lib/http/route";
import { resetPassword } from "@/lib/server/accounts/password";

/** Sets a new password by a link's token and ends every session. */
export const POST = route(
  { access: "public", body: resetBody, limits: [{ name: "token", max: 60, windowS: 900, by: "address" }] },
  ({ body, requestId }) => resetPassword({ ...body, requestId }),
);
