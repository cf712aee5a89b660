import { newUpload } from "@/lib/contracts/uploads";
import { reply } from "@/lib/http/reply";
import { route } from "@/lib/http/route";
import { beginUpload } from "@/lib/server/uploads/uploads";

/** Announces an upload; its bytes then come by tus under the one-use key. */
export const POST = route({ access: "signed_in", body: newUpload }, async ({ actor, body }) =>
  reply(await beginUpload(actor, body), { status: 201 }),
);
