import { baselineParams, baselineSchema } from "@/lib/contracts/baselines";
import { route } from "@/lib/http/route";
import { readBaseline } from "@/lib/server/reading/read-baselines";

/** A reference fan: units, agreed values, bridges, and what published sessions read of it. */
export const GET = route({ access: "public", params: baselineParams }, async ({ params }) =>
  baselineSchema.parse(await readBaseline(params)),
);
