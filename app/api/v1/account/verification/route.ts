import { emailBody } from "@/lib/contracts/accounts";
import { reply } from "@/lib/http/reply";
import { route } from "@/lib/http/route";
import { sendVerificationAgain } from "@/lib/server/accounts/sign-up";

/** Sends the confirming letter anew, where an account waits for it. */
export const POST = route(
  { access: "public", body: emailBody, limits: [{ name: "letters", max: 60, windowS: 3600, by: "address" }] },
  async ({ body }) => {
    await sendVerificationAgain(body);
    return reply({}, { status: 202 });
  },
);
