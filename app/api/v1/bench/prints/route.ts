import { printJobs } from "@/lib/contracts/bench-prints";
import { route } from "@/lib/http/route";
import { readPrintJobs } from "@/lib/server/bench/queue";

/** Job tickets: what to print and spin up, and what became of each copy. */
export const GET = route({ access: "signed_in" }, async ({ actor }) => printJobs.parse(await readPrintJobs(actor)));
