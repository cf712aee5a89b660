import { mailChoices } from "@/lib/contracts/accounts";
import { route } from "@/lib/http/route";
import { chooseMail } from "@/lib/server/accounts/account";

/** Keeps what one wants to be told by mail. */
export const PUT = route({ access: "signed_in", body: mailChoices }, ({ actor, body }) => chooseMail(actor, body));
