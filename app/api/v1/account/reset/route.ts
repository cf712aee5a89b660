import { emailBody } from "@/lib/contracts/accounts";
import { reply } from "@/lib/http/reply";
import { route } from "@/lib/http/route";
import { askForReset } from "@/lib/server/accounts/password";

/** Asks for a link to set a new password, the same answer whether or not there is such an account. */
export const POST = route(
  { access: "public", body: emailBody, limits: [{ name: "letters", max: 60, windowS: 3600, by: "address" }] },
  async ({ body }) => {
    await askForReset(body);
    return reply({}, { status: 202 });
  },
);
