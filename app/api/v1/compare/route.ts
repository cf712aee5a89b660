import { compareQuery } from "@/lib/contracts/compare";
import { route } from "@/lib/http/route";
import { compareAnswer } from "@/lib/server/reading/compare-answer";

/** One to four public entries over the baseline, with figures at one level and traits side by side. */
export const GET = route({ access: "public", query: compareQuery }, ({ query }) =>
  compareAnswer({ named: query.entries, levelDba: query.level }),
);
