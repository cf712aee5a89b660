import { newUpload, uploadsQuery } from "@/lib/contracts/uploads";
import { reply } from "@/lib/http/reply";
import { route } from "@/lib/http/route";
import { beginUpload, openUploads } from "@/lib/server/uploads/uploads";

/** One's own latest uploads for a revision or session: what can be come back to. */
export const GET = route({ access: "signed_in", query: uploadsQuery }, async ({ actor, query }) => ({
  items: await openUploads(actor, { subjectId: query.subject }),
}));

/** Announces an upload; its bytes then come by tus to the address in the answer. */
export const POST = route(
  { access: "signed_in", body: newUpload, limits: [{ name: "upload", max: 300, windowS: 3_600 }] },
  async ({ actor, body }) => reply(await beginUpload(actor, body), { status: 201 }),
);
