import { benchSetup, newBench } from "@/lib/contracts/bench-admin";
import { made } from "@/lib/contracts/seasons-admin";
import { reply } from "@/lib/http/reply";
import { route } from "@/lib/http/route";
import { addBench, readBenchSetup } from "@/lib/server/benches/benches";

/** Everything that a season is set up from. */
export const GET = route({ access: "signed_in" }, async ({ actor }) => benchSetup.parse(await readBenchSetup(actor)));

/** Adds a bench. */
export const POST = route({ access: "signed_in", body: newBench }, async ({ actor, body, requestId }) =>
  reply(made.parse(await addBench({ actor, requestId }, body)), { status: 201 }),
);
