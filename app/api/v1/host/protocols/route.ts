import { newProtocol } from "@/lib/contracts/bench-admin";
import { made } from "@/lib/contracts/seasons-admin";
import { reply } from "@/lib/http/reply";
import { route } from "@/lib/http/route";
import { addProtocol } from "@/lib/server/benches/benches";

/** Adds a protocol. */
export const POST = route({ access: "signed_in", body: newProtocol }, async ({ actor, body, requestId }) =>
  reply(made.parse(await addProtocol({ actor, requestId }, body)), { status: 201 }),
);
