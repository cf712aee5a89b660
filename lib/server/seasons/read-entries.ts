import { appDb } from "@/db/client/handles";
import { hostEntryRows, type HostEntryRow } from "@/db/queries/host-entries";
import type { HostEntries, HostEntriesQuery, HostEntry } from "@/lib/contracts/entries";
import type { Actor } from "@/lib/domain/accounts/actor";
import { entryMovesFor, type EntryState } from "@/lib/domain/designs/entry-moves";
import { cutPage } from "../cut-page";
import { demand } from "../permission";

/** Moves that the operator's screens make; here the host sees the others. */
const atTheBench = new Set<EntryState>(["printing"]);

/** An entry as the host sees it, with the moves open to a host. */
export function hostEntryView({ revisionId: _revisionId, stateAt, ...row }: HostEntryRow): HostEntry {
  return {
    ...row,
    stateAt: stateAt.toISOString(),
    moves: entryMovesFor(row.state, row.everPublished, ["host"])
      .map((move) => move.to)
      .filter((to) => !atTheBench.has(to)),
  };
}

/** A page of entries for the host, those that waited longest first; by default of all that are on their way. */
export async function readHostEntries(actor: Actor, query: HostEntriesQuery): Promise<HostEntries> {
  demand(actor, "entry.judge");
  const states: readonly EntryState[] = query.state
    ? [query.state]
    : ["sent_in", "returned", "accepted", "printing", "on_the_bench", "in_review"];
  const limit = query.limit ?? 50;
  const { seasonId, after } = query;
  const rows = await hostEntryRows(appDb(), { seasonId, states, after, limit: limit + 1 });
  const { page, next } = cutPage(rows, limit, ({ entryId }) => entryId);
  return { items: page.map(hostEntryView), next };
}
