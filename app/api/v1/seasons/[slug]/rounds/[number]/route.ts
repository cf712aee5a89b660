import { roundParams, roundSchema, standingQuery } from "@/lib/contracts/seasons";
import { route } from "@/lib/http/route";
import { readRound } from "@/lib/server/reading/read-seasons";

/** A published round with its standing, under the season's rule or `?rule=`. */
export const GET = route({ access: "public", params: roundParams, query: standingQuery }, async ({ params, query }) =>
  roundSchema.parse(await readRound({ ...params, ...query })),
);
