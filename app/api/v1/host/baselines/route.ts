import { newBaseline } from "@/lib/contracts/bench-admin";
import { made } from "@/lib/contracts/seasons-admin";
import { reply } from "@/lib/http/reply";
import { route } from "@/lib/http/route";
import { addBaseline } from "@/lib/server/benches/benches";

/** Adds a baseline: a reference fan. */
export const POST = route({ access: "signed_in", body: newBaseline }, async ({ actor, body, requestId }) =>
  reply(made.parse(await addBaseline({ actor, requestId }, body)), { status: 201 }),
);
