import { route } from "@/lib/http/route";
import { receivePiece } from "@/lib/server/uploads/uploads";

/** The open protocol for resumable uploads, tus 1.0.0, for those who announced one: where it stands, and the next piece. */
const speak = route({ access: "signed_in", body: "raw" }, ({ actor, request }) => receivePiece(actor, request));

export { speak as HEAD, speak as PATCH };
