import { route } from "@/lib/http/route";
import { receivePiece } from "@/lib/server/uploads/uploads";

/** The open protocol for resumable uploads, tus 1.0.0, for those who announced one. */
const speak = route({ access: "signed_in", body: "raw" }, ({ actor, request }) => receivePiece(actor, request));

export { speak as DELETE, speak as HEAD, speak as OPTIONS, speak as PATCH, speak as POST };
