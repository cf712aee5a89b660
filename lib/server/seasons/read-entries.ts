import { appDb } from "@/db/client/handles";
import { hostEntryRows, type HostEntryRow } from "@/db/queries/host-entries";
import type { HostEntry } from "@/lib/contracts/entries";
import type { Actor } from "@/lib/domain/accounts/actor";
import { entryMovesFor, type EntryState } from "@/lib/domain/designs/entry-moves";
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

/** Entries for the host, those that waited longest first; by default all that are on their way. */
export async function readHostEntries(
  actor: Actor,
  query: { state?: EntryState; seasonId?: string },
): Promise<{ items: HostEntry[] }> {
  demand(actor, "entry.judge");
  const states: readonly EntryState[] = query.state
    ? [query.state]
    : ["sent_in", "returned", "accepted", "printing", "on_the_bench", "in_review"];
  const rows = await hostEntryRows(appDb(), { seasonId: query.seasonId, states });
  return { items: rows.map(hostEntryView) };
}
