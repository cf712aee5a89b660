import { seasonsSchema } from "@/lib/contracts/seasons";
import { route } from "@/lib/http/route";
import { readSeasons } from "@/lib/server/reading/read-seasons";

/** Seasons that have opened, with their published rounds. */
export const GET = route({ access: "public" }, async () => seasonsSchema.parse(await readSeasons()));
