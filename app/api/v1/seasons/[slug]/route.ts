import { seasonParams, seasonSchema, standingQuery } from "@/lib/contracts/seasons";
import { route } from "@/lib/http/route";
import { readSeason } from "@/lib/server/reading/read-seasons";

/** A season with its standing, under its own rule or `?rule=`. */
export const GET = route({ access: "public", params: seasonParams, query: standingQuery }, async ({ params, query }) =>
  seasonSchema.parse(await readSeason({ ...params, ...query })),
);
