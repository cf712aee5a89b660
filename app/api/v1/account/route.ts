import { account, changeHandleBody, signUpBody } from "@/lib/contracts/accounts";
import { reply } from "@/lib/http/reply";
import { route } from "@/lib/http/route";
import { changeHandle, readAccount } from "@/lib/server/accounts/account";
import { signUp } from "@/lib/server/accounts/sign-up";

/** One's own account. */
export const GET = route({ access: "signed_in" }, async ({ actor }) => account.parse(await readAccount(actor)));

/** Signs up. The answer is the same for a known and an unknown address. */
export const POST = route(
  { access: "public", body: signUpBody, limits: [{ name: "sign_up", max: 60, windowS: 3600, by: "address" }] },
  async ({ body }) => {
    await signUp(body);
    return reply({}, { status: 202 });
  },
);

/** Takes another handle. */
export const PATCH = route({ access: "signed_in", body: changeHandleBody }, ({ actor, body, requestId }) =>
  changeHandle(actor, body, requestId),
);
