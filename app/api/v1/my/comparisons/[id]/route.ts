import { idParams } from "@/lib/contracts/base";
import { comparisonChange, savedComparison } from "@/lib/contracts/saved";
import { route } from "@/lib/http/route";
import { changeComparison, deleteComparison, readComparison } from "@/lib/server/saved/comparisons";

/** One of one's own saved comparisons. */
export const GET = route({ access: "signed_in", params: idParams }, async ({ actor, params }) =>
  savedComparison.parse(await readComparison(actor, params)),
);

/** Its name, note and whether it is shared. */
export const PUT = route(
  { access: "signed_in", params: idParams, body: comparisonChange },
  async ({ actor, params, body }) => savedComparison.parse(await changeComparison(actor, params, body)),
);

export const DELETE = route({ access: "signed_in", params: idParams }, ({ actor, params }) =>
  deleteComparison(actor, params),
);
