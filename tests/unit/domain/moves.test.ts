import { describe, expect, it } from "vitest";
import { ENTRY_MOVES, ENTRY_STATES, entryMove, entryMovesFor } from "@/lib/domain/designs/entry-moves";
import { ROUND_MOVES, readyForReview, roundMove } from "@/lib/domain/seasons/round-moves";

describe("moves of an entry", () => {
  it("has no pair twice for one history", () => {
    const keys = ENTRY_MOVES.map((row) => `${row.from} ${row.to} ${row.history}`);
    expect(new Set(keys).size).toBe(keys.length);
  });

  it("lets nothing leave declined, withdrawn, carried over and replaced", () => {
    const closed = ["declined", "withdrawn", "carried_over", "replaced"];
    expect(ENTRY_MOVES.filter((row) => closed.includes(row.from))).toEqual([]);
  });

  it("reaches published only by the round's publication", () => {
    expect(ENTRY_MOVES.filter((row) => row.to === "published").map((row) => row.by)).toEqual([["publication"]]);
  });

  it("lets an entry that was ever published leave only by publication or to withdrawn by the host", () => {
    // The states that a published entry can come back to, found by walking the table.
    const reached = new Set(["published"]);
    for (let grown = true; grown;) {
      const before = reached.size;
      for (const from of ENTRY_STATES)
        for (const to of ENTRY_STATES) if (reached.has(from) && entryMove(from, to, true)) reached.add(to);
      grown = reached.size > before;
    }
    expect([...reached].sort()).toEqual(["in_review", "on_the_bench", "printing", "published", "withdrawn"]);
    for (const from of reached) {
      const out = ENTRY_STATES.map((to) => entryMove(from as never, to, true)).filter((row) => row?.to === "withdrawn");
      for (const row of out) expect(row).toMatchObject({ by: ["host"], needsReason: true });
    }
    expect(entryMove("on_the_bench", "carried_over", true)).toBeUndefined();
    expect(entryMove("on_the_bench", "declined", true)).toBeUndefined();
  });

  it("gives a designer the way out of each state before publication", () => {
    const open = ENTRY_STATES.filter((from) =>
      entryMovesFor(from, false, ["designer"]).some((row) => row.to === "withdrawn"),
    );
    expect(open).toEqual(["draft", "sent_in", "returned", "accepted", "printing", "on_the_bench", "in_review"]);
  });
});

describe("moves of a round", () => {
  it("goes the one way forward and back to review when something signed changes", () => {
    expect(ROUND_MOVES.map((row) => `${row.from} → ${row.to}`)).toEqual([
      "planned → measuring",
      "measuring → in_review",
      "in_review → measuring",
      "in_review → signed",
      "signed → scheduled",
      "scheduled → published",
      "signed → in_review",
      "scheduled → in_review",
    ]);
    expect(roundMove("published", "in_review")).toBeUndefined();
  });

  it("is ready for review when each entry is in review or taken out, and not when it is empty", () => {
    const inReview = { state: "in_review", takenOut: false };
    expect(readyForReview([inReview, { state: "printing", takenOut: true }])).toBe(true);
    expect(readyForReview([inReview, { state: "on_the_bench", takenOut: false }])).toBe(false);
    expect(readyForReview([{ state: "printing", takenOut: true }])).toBe(false);
    expect(readyForReview([])).toBe(false);
  });
});
