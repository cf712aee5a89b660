import { idParams } from "@/lib/contracts/base";
import { route } from "@/lib/http/route";
import { readUpload } from "@/lib/server/uploads/uploads";

/** What became of one's own upload. */
export const GET = route({ access: "signed_in", params: idParams }, ({ actor, params }) =>
  readUpload(actor, { uploadId: params.id }),
);
