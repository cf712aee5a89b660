import { tokenBody } from "@/lib/contracts/accounts";
import { route } from "@/lib/http/route";
import { confirmNewEmail } from "@/lib/server/accounts/email";

/** Takes the new address by its link's token. */
export const POST = route(
  { access: "public", body: tokenBody, limits: [{ name: "token", max: 60, windowS: 900, by: "address" }] },
  ({ body, requestId }) => confirmNewEmail({ ...body, requestId }),
);
