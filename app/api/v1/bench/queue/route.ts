import { benchQueue } from "@/lib/contracts/bench-prints";
import { route } from "@/lib/http/route";
import { readQueue } from "@/lib/server/bench/queue";

/** What to print, mount and measure next. */
export const GET = route({ access: "signed_in" }, async ({ actor }) => benchQueue.parse(await readQueue(actor)));
