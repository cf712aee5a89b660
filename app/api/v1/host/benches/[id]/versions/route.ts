import { idParams } from "@/lib/contracts/base";
import { newBenchVersion } from "@/lib/contracts/bench-admin";
import { made } from "@/lib/contracts/seasons-admin";
import { reply } from "@/lib/http/reply";
import { route } from "@/lib/http/route";
import { addBenchVersion } from "@/lib/server/benches/benches";

/** Adds a version of a bench: what changed, and why. */
export const POST = route(
  { access: "signed_in", params: idParams, body: newBenchVersion },
  async ({ actor, params, body, requestId }) =>
    reply(
      made.parse(await addBenchVersion({ actor, requestId }, { benchId: params.id, version: body, at: new Date() })),
      { status: 201 },
    ),
);
