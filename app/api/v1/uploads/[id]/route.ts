import { idParams } from "@/lib/contracts/base";
import { route } from "@/lib/http/route";
import { cancelUpload, readUpload } from "@/lib/server/uploads/uploads";

/** What became of one's own upload. */
export const GET = route({ access: "signed_in", params: idParams }, ({ actor, params }) =>
  readUpload(actor, { uploadId: params.id }),
);

/** Breaks one's own upload off. */
export const DELETE = route({ access: "signed_in", params: idParams }, ({ actor, params }) =>
  cancelUpload(actor, { uploadId: params.id, now: new Date() }),
);
