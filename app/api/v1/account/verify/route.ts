import { tokenBody } from "@/lib/contracts/accounts";
import { route } from "@/lib/http/route";
import { verifyEmail } from "@/lib/server/accounts/sign-up";

/** Confirms an account's address. A POST, so that programs that look at links in mail don't spend them. */
export const POST = route(
  { access: "public", body: tokenBody, limits: [{ name: "token", max: 60, windowS: 900, by: "address" }] },
  ({ body, requestId }) => verifyEmail({ ...body, requestId }),
);
