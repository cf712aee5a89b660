import { appDb } from "@/db/client/handles";
import type { Handle } from "@/db/client/connect";
import { insertEntry, lockEntry, withdrawPublished, type LockedEntry } from "@/db/queries/host-entries";
import { moveEntries } from "@/db/queries/moves";
import { insertEvent } from "@/db/queries/publishing";
import { seasonHead } from "@/db/queries/host-seasons";
import type { HostEntryMove } from "@/lib/contracts/entries";
import type { Permission } from "@/lib/domain/accounts/policy";
import { entryMove, type EntryState } from "@/lib/domain/designs/entry-moves";
import { ExpectedError } from "@/lib/domain/expected-error";
import { note, type Asked } from "../audit/audit";
import { demand } from "../permission";
import { takeOutOfRounds } from "./entry-rounds";

const permissions: Record<HostEntryMove["to"], Permission> = {
  accepted: "entry.judge",
  returned: "entry.judge",
  declined: "entry.judge",
  withdrawn: "entry.withdraw",
  on_the_bench: "entry.remeasure",
  carried_over: "entry.carry",
};

const inWords = (state: string) => state.replaceAll("_", " ");

/**
 * Moves an entry as the host: takes it, returns or declines it, carries it over to another season, has it measured
 * again, or withdraws a published one and leaves a stub. What leaves its round takes a signature away with it.
 * @throws ExpectedError moved_on when it isn't in the state that was seen, or the move isn't open to it
 */
export async function moveEntryByHost(
  asked: Asked,
  { entryId, move, at }: { entryId: string; move: HostEntryMove; at: Date },
): Promise<{ state: EntryState; newEntryId: string | null }> {
  const { actor } = asked;
  demand(actor, permissions[move.to]);
  return appDb().transaction(async (tx) => {
    const entry = await lockEntry(tx, { entryId });
    if (!entry) throw new ExpectedError("not_found", "There is no such entry.");
    if (entry.state !== move.from) {
      throw new ExpectedError("moved_on", `The entry is ${inWords(entry.state)} by now, not ${inWords(move.from)}.`);
    }
    const row = entryMove(entry.state, move.to, entry.everPublished);
    if (!row?.by.includes("host")) {
      const words = `The host can't move this entry from ${inWords(entry.state)} to ${inWords(move.to)}.`;
      throw new ExpectedError("moved_on", words);
    }
    const reason = "reason" in move ? (move.reason ?? null) : null;
    await moveEntries(tx, [
      { entryId, from: entry.state, to: move.to, byPerson: actor.personId, byRight: "host", reason, at },
    ]);
    const newEntryId = await followUp(tx, { entry, move, byPerson: actor.personId, at });
    await note(tx, asked, {
      action: "entry.move",
      subjectKind: "entry",
      subjectId: entryId,
      before: entry.state,
      after: { state: move.to, reason, newEntryId },
    });
    return { state: move.to, newEntryId };
  });
}

async function followUp(
  tx: Handle,
  { entry, move, byPerson, at }: { entry: LockedEntry; move: HostEntryMove; byPerson: string; at: Date },
): Promise<string | null> {
  const { entryId } = entry;
  if (move.to === "declined" || move.to === "withdrawn") {
    await takeOutOfRounds(tx, { entryId, reason: move.reason, at });
  }
  if (move.to === "withdrawn" && entry.everPublished) {
    await withdrawPublished(tx, { entryId, reason: move.reason, byPerson, at });
    await insertEvent(tx, { kind: "entry.withdrawn", subject: { entryId }, consumers: ["mail", "feed"], at });
  }
  if (move.to !== "carried_over") return null;
  const season = await seasonHead(tx, { seasonId: move.seasonId });
  if (!season || season.closedAt || move.seasonId === entry.seasonId) {
    throw new ExpectedError("malformed", "An entry is carried over to another season that isn't closed.", [
      { path: "seasonId", message: "is no other season that takes entries" },
    ]);
  }
  await takeOutOfRounds(tx, { entryId, reason: `Carried over to season ${season.number}.`, at });
  return insertEntry(tx, { revisionId: entry.revisionId, seasonId: move.seasonId, carriedFrom: entryId });
}
