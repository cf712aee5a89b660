import { revisionParams } from "@/lib/contracts/revision-files";
import { route } from "@/lib/http/route";
import { readRevisionFiles } from "@/lib/server/designs/revision-files";

/** The files of a revision of one's own, and its traits as read and as declared. */
export const GET = route({ access: "signed_in", params: revisionParams }, ({ actor, params }) =>
  readRevisionFiles(actor, params),
);
