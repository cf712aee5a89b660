import { idParams } from "@/lib/contracts/base";
import { newKeepOutMesh } from "@/lib/contracts/keep-outs";
import { made } from "@/lib/contracts/seasons-admin";
import { reply } from "@/lib/http/reply";
import { route } from "@/lib/http/route";
import { addKeepOutMesh } from "@/lib/server/benches/keep-out-mesh";

/** Adds a solid by its model file (STL or 3MF as application/octet-stream, up to 32 MB) to a bench version. */
export const POST = route(
  {
    access: "signed_in",
    params: idParams,
    query: newKeepOutMesh,
    body: "raw",
    limits: [{ name: "keep-out-mesh", max: 30, windowS: 60 }],
  },
  async ({ actor, params, query, request, requestId }) =>
    reply(made.parse(await addKeepOutMesh({ actor, requestId }, { benchVersionId: params.id, said: query, request })), {
      status: 201,
    }),
);
