import { hostEntries, hostEntriesQuery } from "@/lib/contracts/entries";
import { route } from "@/lib/http/route";
import { readHostEntries } from "@/lib/server/seasons/read-entries";

/** Entries on their way, those that waited longest first. */
export const GET = route({ access: "signed_in", query: hostEntriesQuery }, async ({ actor, query }) =>
  hostEntries.parse(await readHostEntries(actor, query)),
);
