import { hostSeasons, made, newSeason } from "@/lib/contracts/seasons-admin";
import { reply } from "@/lib/http/reply";
import { route } from "@/lib/http/route";
import { makeSeason, readHostSeasons } from "@/lib/server/seasons/seasons";

/** Seasons with their rounds, for the host. */
export const GET = route({ access: "signed_in" }, async ({ actor }) => hostSeasons.parse(await readHostSeasons(actor)));

/** Makes a season that isn't open yet. */
export const POST = route({ access: "signed_in", body: newSeason }, async ({ actor, body, requestId }) =>
  reply(made.parse(await makeSeason({ actor, requestId }, body)), { status: 201 }),
);
