/** The states of a round, spelled the same in code and database. */
export const ROUND_STATES = ["planned", "measuring", "in_review", "signed", "scheduled", "published"] as const;
export type RoundState = (typeof ROUND_STATES)[number];

/** Who moves a round; "change" is the consequence of a change in anything that was signed. */
export type RoundMover = "operator" | "host" | "reviewer" | "publication" | "change";

export type RoundMove = {
  readonly from: RoundState;
  readonly to: RoundState;
  readonly by: readonly RoundMover[];
  readonly needsReason: boolean;
};

const move = (from: RoundState, to: RoundState, by: readonly RoundMover[], needsReason = false): RoundMove => ({
  from,
  to,
  by,
  needsReason,
});

/** Every move there is; a pair that isn't here is refused. Publishing at once is scheduling for now. */
export const ROUND_MOVES: readonly RoundMove[] = [
  move("planned", "measuring", ["operator", "host"]),
  // Each entry of the round is in review, or taken out by the host: see `readyForReview`.
  move("measuring", "in_review", ["operator", "host"]),
  // An entry was sent back.
  move("in_review", "measuring", ["reviewer"], true),
  move("in_review", "signed", ["reviewer"]),
  move("signed", "scheduled", ["host"]),
  move("scheduled", "published", ["publication"]),
  move("signed", "in_review", ["change"], true),
  move("scheduled", "in_review", ["change"], true),
];

/** The row that lets a round go from one state to another, or undefined when there is none. */
export function roundMove(from: RoundState, to: RoundState): RoundMove | undefined {
  return ROUND_MOVES.find((row) => row.from === from && row.to === to);
}

/**
 * Whether a round may go to review: it has an entry, and each one is in review or was taken out by the host.
 * @param entries the round's entries, in any order
 */
export function readyForReview(entries: readonly { readonly state: string; readonly takenOut: boolean }[]): boolean {
  const left = entries.filter((entry) => !entry.takenOut);
  return left.length > 0 && left.every((entry) => entry.state === "in_review");
}
