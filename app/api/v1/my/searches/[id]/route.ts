import { idParams } from "@/lib/contracts/base";
import { route } from "@/lib/http/route";
import { deleteSearch } from "@/lib/server/saved/searches";

export const DELETE = route({ access: "signed_in", params: idParams }, ({ actor, params }) =>
  deleteSearch(actor, params),
);
