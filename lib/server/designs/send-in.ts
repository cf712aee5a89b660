import { appDb } from "@/db/client/handles";
import { insertEntry, lockEntry } from "@/db/queries/host-entries";
import { moveEntries } from "@/db/queries/moves";
import { entriesOfDesign, seasonFit } from "@/db/queries/own-designs";
import { entryMove, type EntryState } from "@/lib/domain/designs/entry-moves";
import { ExpectedError } from "@/lib/domain/expected-error";
import { note, type Asked } from "../audit/audit";
import { takeOutOfRounds } from "../seasons/entry-rounds";
import { ownRevisions } from "./make-design";

/**
 * Sends a revision in to an open season. Entries of earlier revisions that were returned are replaced by it.
 * @throws ExpectedError moved_on when the season takes none; malformed when it doesn't fit; already_there
 */
export async function sendIn(
  asked: Asked,
  { slug, letter, seasonId, at }: { slug: string; letter: string; seasonId: string; at: Date },
): Promise<{ entryId: string; state: EntryState }> {
  return appDb().transaction(async (tx) => {
    const { designId, revisions, personId } = await ownRevisions(tx, asked.actor, slug);
    const revision = revisions.find((each) => each.letter === letter);
    if (!revision) throw new ExpectedError("not_found", "The design has no such revision.");
    const fit = await seasonFit(tx, { seasonId, revisionId: revision.revisionId });
    if (!fit?.open) throw new ExpectedError("moved_on", "The season takes no entries now.");
    const fields = [
      ...(fit.frame ? [] : [{ path: "seasonId", message: "doesn't take this revision's frame" }]),
      ...(fit.stack ? [] : [{ path: "seasonId", message: "takes only shorter inlet stacks" }]),
    ];
    if (fields.length > 0) {
      throw new ExpectedError("malformed", `The revision doesn't fit the season: it ${fields[0]?.message}.`, fields);
    }
    const here = await entriesOfDesign(tx, { designId, seasonId });
    if (here.some((entry) => entry.revisionId === revision.revisionId)) {
      throw new ExpectedError("already_there", "This revision is in this season already.");
    }
    const entryId = await insertEntry(tx, { revisionId: revision.revisionId, seasonId });
    const by = { byPerson: personId, byRight: "designer" as const, at };
    await moveEntries(tx, [
      { entryId, from: "draft", to: "sent_in", ...by },
      ...here.flatMap((entry) =>
        entry.state === "returned"
          ? [{ entryId: entry.entryId, from: entry.state, to: "replaced" as const, ...by }]
          : [],
      ),
    ]);
    await note(tx, asked, { action: "entry.send_in", subjectKind: "entry", subjectId: entryId });
    return { entryId, state: "sent_in" };
  });
}

/** Sends a returned or carried-over entry in (again), or withdraws one that was never published. */
export async function moveOwnEntry(
  asked: Asked,
  params: { slug: string; entryId: string; from: EntryState; to: "sent_in" | "withdrawn"; reason?: string; at: Date },
): Promise<{ entryId: string; state: EntryState }> {
  const { slug, entryId, to, at } = params;
  return appDb().transaction(async (tx) => {
    const { revisions, personId } = await ownRevisions(tx, asked.actor, slug);
    const entry = await lockEntry(tx, { entryId });
    if (!entry || !revisions.some((each) => each.revisionId === entry.revisionId)) {
      throw new ExpectedError("not_found", "The design has no such entry.");
    }
    const words = entry.state.replaceAll("_", " ");
    if (entry.state !== params.from) throw new ExpectedError("moved_on", `The entry is ${words} by now.`);
    if (!entryMove(entry.state, to, entry.everPublished)?.by.includes("designer")) {
      throw new ExpectedError("moved_on", `You can't move this entry from ${words} to ${to.replaceAll("_", " ")}.`);
    }
    if (to === "sent_in") {
      const fit = await seasonFit(tx, entry);
      if (!fit?.open) throw new ExpectedError("moved_on", "The season takes no entries now.");
    } else {
      await takeOutOfRounds(tx, { entryId, reason: "Withdrawn by its designer.", at });
    }
    const reason = params.reason ?? null;
    await moveEntries(tx, [{ entryId, from: entry.state, to, byPerson: personId, byRight: "designer", reason, at }]);
    await note(tx, asked, {
      action: "entry.move",
      subjectKind: "entry",
      subjectId: entryId,
      before: entry.state,
      after: to,
    });
    return { entryId, state: to };
  });
}
