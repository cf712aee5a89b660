/** The states of an entry, spelled the same in code and database. */
export const ENTRY_STATES = [
  "draft",
  "sent_in",
  "returned",
  "declined",
  "accepted",
  "printing",
  "on_the_bench",
  "in_review",
  "published",
  "withdrawn",
  "carried_over",
  "replaced",
] as const;
export type EntryState = (typeof ENTRY_STATES)[number];

/** Who makes a move: a person in that part, or the publication of the entry's round. */
export type EntryMover = "designer" | "operator" | "host" | "reviewer" | "publication";

/**
 * Whether the row holds for an entry that has ever been published. Such an entry, measured again, leaves only by a
 * round's publication or to withdrawn by the host.
 */
export type EntryHistory = "any" | "never_published" | "ever_published";

export type EntryMove = {
  readonly from: EntryState;
  readonly to: EntryState;
  readonly by: readonly EntryMover[];
  readonly needsReason: boolean;
  readonly history: EntryHistory;
};

const move = (
  from: EntryState,
  to: EntryState,
  by: readonly EntryMover[],
  needsReason = false,
  history: EntryHistory = "any",
): EntryMove => ({ from, to, by, needsReason, history });

/** Every move there is; a pair that isn't here is refused. Unique by (from, to, history). */
export const ENTRY_MOVES: readonly EntryMove[] = [
  move("draft", "sent_in", ["designer"]),
  move("sent_in", "returned", ["host"]),
  move("sent_in", "declined", ["host"]),
  move("sent_in", "accepted", ["host"]),
  move("returned", "sent_in", ["designer"]),
  // By sending in the next revision: changed files are always a new revision.
  move("returned", "replaced", ["designer"]),
  move("accepted", "printing", ["operator", "host"]),
  move("accepted", "declined", ["host"], true),
  move("printing", "declined", ["host"], true, "never_published"),
  move("on_the_bench", "declined", ["host"], true, "never_published"),
  // A failed copy: a new specimen is printed.
  move("printing", "printing", ["operator", "host"]),
  // A specimen passed spin-up.
  move("printing", "on_the_bench", ["operator"]),
  // The specimen was written off.
  move("on_the_bench", "printing", ["operator"]),
  move("on_the_bench", "in_review", ["operator"]),
  move("in_review", "on_the_bench", ["reviewer"], true),
  move("in_review", "published", ["publication"]),
  // Measured again; the old figures stand until the correction.
  move("published", "on_the_bench", ["host"]),
  move("published", "withdrawn", ["host"], true, "ever_published"),
  move("draft", "withdrawn", ["designer"], false, "never_published"),
  move("sent_in", "withdrawn", ["designer"], false, "never_published"),
  move("returned", "withdrawn", ["designer"], false, "never_published"),
  move("accepted", "withdrawn", ["designer"], false, "never_published"),
  move("printing", "withdrawn", ["designer"], false, "never_published"),
  move("on_the_bench", "withdrawn", ["designer"], false, "never_published"),
  move("in_review", "withdrawn", ["designer"], false, "never_published"),
  move("printing", "withdrawn", ["host"], true, "ever_published"),
  move("on_the_bench", "withdrawn", ["host"], true, "ever_published"),
  move("in_review", "withdrawn", ["host"], true, "ever_published"),
  move("sent_in", "carried_over", ["host"], false, "never_published"),
  move("returned", "carried_over", ["host"], false, "never_published"),
  move("accepted", "carried_over", ["host"], false, "never_published"),
  move("printing", "carried_over", ["host"], false, "never_published"),
  move("on_the_bench", "carried_over", ["host"], false, "never_published"),
  move("in_review", "carried_over", ["host"], false, "never_published"),
];

/**
 * The row that lets an entry go from one state to another, or undefined when there is none.
 * @param everPublished whether any publication of this entry exists, also a superseded one
 */
export function entryMove(from: EntryState, to: EntryState, everPublished: boolean): EntryMove | undefined {
  const closed: EntryHistory = everPublished ? "never_published" : "ever_published";
  return ENTRY_MOVES.find((row) => row.from === from && row.to === to && row.history !== closed);
}

/** The moves open to an entry from a state to one in the given part, in the table's order; empty when none. */
export function entryMovesFor(
  from: EntryState,
  everPublished: boolean,
  parts: readonly EntryMover[],
): readonly EntryMove[] {
  return ENTRY_STATES.flatMap((to) => {
    const row = entryMove(from, to, everPublished);
    return row && row.by.some((mover) => parts.includes(mover)) ? [row] : [];
  });
}
