import { baselinesSchema } from "@/lib/contracts/baselines";
import { route } from "@/lib/http/route";
import { readBaselines } from "@/lib/server/reading/read-baselines";

/** Reference fans of open seasons with their units. */
export const GET = route({ access: "public" }, async () => baselinesSchema.parse(await readBaselines()));
