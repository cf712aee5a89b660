import type { EntryMover, EntryState } from "@/lib/domain/designs/entry-moves";
import type { RoundState } from "@/lib/domain/seasons/round-moves";
import type { Handle } from "../client/connect";

export interface EntryMoveRow {
  entryId: string;
  from: EntryState;
  to: EntryState;
  byPerson: string | null;
  byRight: EntryMover;
  reason?: string | null;
  at?: Date;
}

/** Writes moves of entries; the database carries the states along and refuses what its table doesn't know. */
export async function moveEntries(db: Handle, moves: readonly EntryMoveRow[]): Promise<void> {
  if (moves.length === 0) return;
  await db.batchInsert(
    "entry_move",
    moves.map((move) => ({
      entry_id: move.entryId,
      from_state: move.from,
      to_state: move.to,
      by_person: move.byPerson,
      by_right: move.byRight,
      reason: move.reason ?? null,
      ...(move.at && { at: move.at }),
    })),
    200,
  );
}

export interface RoundMoveRow {
  roundId: string;
  from: RoundState;
  to: RoundState;
  byPerson: string | null;
  reason?: string | null;
  at?: Date;
}

/** Writes a move of a round; the database carries the state along. */
export async function moveRound(db: Handle, move: RoundMoveRow): Promise<void> {
  await db("round_move").insert({
    round_id: move.roundId,
    from_state: move.from,
    to_state: move.to,
    by_person: move.byPerson,
    reason: move.reason ?? null,
    ...(move.at && { at: move.at }),
  });
}
