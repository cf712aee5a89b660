import { madeSpecimen, newSpecimen } from "@/lib/contracts/bench-prints";
import { reply } from "@/lib/http/reply";
import { route } from "@/lib/http/route";
import { addSpecimen } from "@/lib/server/bench/specimens";

/** Records a printed copy of an entry that is being printed. */
export const POST = route({ access: "signed_in", body: newSpecimen }, async ({ actor, body, requestId }) =>
  reply(madeSpecimen.parse(await addSpecimen({ actor, requestId }, body, new Date())), { status: 201 }),
);
