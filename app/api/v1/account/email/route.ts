import { changeEmailBody } from "@/lib/contracts/accounts";
import { reply } from "@/lib/http/reply";
import { route } from "@/lib/http/route";
import { askForNewEmail } from "@/lib/server/accounts/email";

/** Asks for another address; a link goes to it. */
export const POST = route({ access: "signed_in", body: changeEmailBody }, async ({ actor, body }) => {
  await askForNewEmail(actor, body);
  return reply({}, { status: 202 });
});
