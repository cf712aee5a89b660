import { idParams } from "@/lib/contracts/base";
import { route } from "@/lib/http/route";
import { dropKeepOut } from "@/lib/server/benches/keep-outs";

/** Takes a keep-out solid off its bench version, as long as nothing stands on that. */
export const DELETE = route({ access: "signed_in", params: idParams }, async ({ actor, params, requestId }) =>
  dropKeepOut({ actor, requestId }, { keepOutId: params.id }),
);
