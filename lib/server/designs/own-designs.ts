import { appDb } from "@/db/client/handles";
import { ownChoiceRows, ownDesignRows, type OwnDesignRow } from "@/db/queries/own-designs";
import type { OwnChoices, OwnDesign } from "@/lib/contracts/own-designs";
import type { Actor } from "@/lib/domain/accounts/actor";
import { entryMovesFor } from "@/lib/domain/designs/entry-moves";
import { ExpectedError } from "@/lib/domain/expected-error";
import { demand } from "../permission";

const iso = (text: string) => new Date(text).toISOString();

/** A design as its owners see it: states and what was said with them, never a figure before the hour. */
function view({ revisions, entries, ...design }: OwnDesignRow): OwnDesign {
  return {
    ...design,
    revisions: revisions.map((each) => ({ ...each, sentInAt: each.sentInAt && iso(each.sentInAt) })),
    entries: entries.map(({ everPublished, ...entry }) => ({
      ...entry,
      stateAt: iso(entry.stateAt),
      moves: entryMovesFor(entry.state, everPublished, ["designer"]).flatMap(({ to }) =>
        to === "sent_in" || to === "withdrawn" ? [to] : [],
      ),
    })),
  };
}

export async function readOwnDesigns(actor: Actor): Promise<{ items: OwnDesign[] }> {
  demand(actor, "design.create");
  return { items: (await ownDesignRows(appDb(), { personId: actor.personId })).map(view) };
}

/** @throws ExpectedError not_found for another's design as for none */
export async function readOwnDesign(actor: Actor, { slug }: { slug: string }): Promise<OwnDesign> {
  demand(actor, "design.create");
  const [row] = await ownDesignRows(appDb(), { personId: actor.personId, slug });
  if (!row) throw new ExpectedError("not_found", "You own no such design.");
  return view(row);
}

/** Seasons that take entries and frames, for the forms. */
export async function readOwnChoices(actor: Actor): Promise<OwnChoices> {
  demand(actor, "design.create");
  return ownChoiceRows(appDb());
}
