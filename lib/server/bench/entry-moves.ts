import { appDb } from "@/db/client/handles";
import type { Handle } from "@/db/client/connect";
import { queueRow, type QueueRow } from "@/db/queries/bench-queue";
import { setParts, specimensOfRevisions, type SpecimenRow } from "@/db/queries/bench-specimens";
import { moveEntries } from "@/db/queries/moves";
import type { BenchMove } from "@/lib/contracts/bench-prints";
import { entryMove, type EntryMover, type EntryState } from "@/lib/domain/designs/entry-moves";
import { ExpectedError } from "@/lib/domain/expected-error";
import { note, type Asked } from "../audit/audit";
import { demand } from "../permission";
import { demandNotOwner, demandRoundWork } from "./bench-access";
import { whyNotReview } from "./why-not-review";

const inWords = (state: string) => state.replaceAll("_", " ");

/**
 * Moves an entry at the bench: to print, a failed copy, to the bench (a copy passed its spin-up), back to print (the
 * copy is written off), to review (all gates passed).
 * @param input `from` is the state that was seen @throws ExpectedError moved_on, with what is missing; forbidden
 */
export async function moveAtBench(
  asked: Asked,
  { entryId, at, ...input }: { entryId: string; at: Date } & BenchMove,
): Promise<{ state: EntryState }> {
  const { actor } = asked;
  demand(actor, "print.work");
  return appDb().transaction(async (tx) => {
    const row = await queueRow(tx, { entryId, lock: true });
    if (!row) throw new ExpectedError("not_found", "There is no such entry.");
    if (row.state !== input.from) {
      throw new ExpectedError("moved_on", `The entry is ${inWords(row.state)} by now, not ${inWords(input.from)}.`);
    }
    const move = entryMove(row.state, input.to, row.everPublished);
    if (!move) {
      throw new ExpectedError("moved_on", `An entry doesn't go from ${inWords(row.state)} to ${inWords(input.to)}.`);
    }
    if (row.state === "on_the_bench") {
      await demandRoundWork(tx, asked, row.roundId);
      await demandNotOwner(tx, actor, entryId);
    }
    await followUp(tx, row, input);
    const byRight: EntryMover = actor.role === "host" && move.by.includes("host") ? "host" : "operator";
    await moveEntries(tx, [
      { entryId, from: row.state, to: input.to, byPerson: actor.personId, byRight, reason: input.reason, at },
    ]);
    await note(tx, asked, {
      action: "entry.move",
      subjectKind: "entry",
      subjectId: entryId,
      before: row.state,
      after: { state: input.to, reason: input.reason ?? null },
    });
    return { state: input.to };
  });
}

const passed = (copy: SpecimenRow) => copy.parts.length > 0 && copy.parts.every((part) => part.state === "passed");

/** What a move asks for, and what it does to the copies. @throws ExpectedError moved_on, malformed */
async function followUp(tx: Handle, row: QueueRow, { from, to, reason }: BenchMove): Promise<void> {
  if (to === "in_review") {
    const why = await whyNotReview(tx, row);
    if (why.length > 0) throw new ExpectedError("moved_on", `Not to review yet. ${why.join(" ")}`);
    return;
  }
  if (from === "accepted") return;
  const copies = await specimensOfRevisions(tx, { revisionIds: [row.revisionId] });
  if (to === "on_the_bench") {
    if (!copies.some(passed)) {
      throw new ExpectedError("moved_on", "No printed copy of it has passed its spin-up with every rotor.");
    }
    return;
  }
  if (!reason) {
    throw new ExpectedError("malformed", "Say what became of the copy.", [{ path: "reason", message: "is missing" }]);
  }
  const copy = from === "on_the_bench" ? copies.find(passed) : copies[0];
  if (!copy) return;
  if (from === "on_the_bench") await setParts(tx, { specimenId: copy.id, from: ["passed"], to: "written_off" });
  else await setParts(tx, { specimenId: copy.id, from: ["printed"], to: "failed" });
}
