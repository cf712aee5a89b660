import { ledgerSchema } from "@/lib/contracts/corrections";
import { route } from "@/lib/http/route";
import { readCorrections } from "@/lib/server/reading/read-corrections";

/** The ledger of corrections and answered questions. */
export const GET = route({ access: "public" }, async () => ledgerSchema.parse(await readCorrections()));
