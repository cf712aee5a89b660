import { peoplePage, peopleQuery } from "@/lib/contracts/people";
import { route } from "@/lib/http/route";
import { readPeople } from "@/lib/server/accounts/people";

/** People, for the host. */
export const GET = route({ access: "signed_in", query: peopleQuery }, async ({ actor, query }) =>
  peoplePage.parse(await readPeople(actor, query)),
);
