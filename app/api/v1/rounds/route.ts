import { roundsSchema } from "@/lib/contracts/seasons";
import { route } from "@/lib/http/route";
import { readRounds } from "@/lib/server/reading/read-seasons";

/** Published rounds of all seasons, the newest first. */
export const GET = route({ access: "public" }, async () => roundsSchema.parse(await readRounds()));
