import { methodSchema } from "@/lib/contracts/method";
import { route } from "@/lib/http/route";
import { readMethod } from "@/lib/server/reading/read-method";

/** Method versions and the budgets of the benches. */
export const GET = route({ access: "public" }, async () => methodSchema.parse(await readMethod()));
