import { kitSchema } from "@/lib/contracts/kit";
import { seasonParams } from "@/lib/contracts/seasons";
import { route } from "@/lib/http/route";
import { readKit } from "@/lib/server/kit/read-kit";

/** What a model must fit in a season: frames, limits and keep-out solids, mm. */
export const GET = route({ access: "public", params: seasonParams }, async ({ params }) =>
  kitSchema.parse(await readKit(params)),
);
