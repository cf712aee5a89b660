import { expect, it } from "vitest";
import { ENTRY_MOVES } from "@/lib/domain/designs/entry-moves";
import { ROUND_MOVES } from "@/lib/domain/seasons/round-moves";
import { setUpDatabase } from "../setup/database";

const db = setUpDatabase();

const line = (from: string, to: string, by: readonly string[], needsReason: boolean, history = "") =>
  `${from} to ${to} by ${[...by].sort().join(" and ")}${needsReason ? " with a reason" : ""} ${history}`.trim();

it("the database knows the moves of entries that the domain knows, with who makes them and their history", async () => {
  const rows = await db.owner("entry_transition").select("*");
  const stored = rows.map((row) => line(row.from_state, row.to_state, row.movers, row.needs_reason, row.history));
  const known = ENTRY_MOVES.map((move) => line(move.from, move.to, move.by, move.needsReason, move.history));
  expect(stored.sort()).toEqual(known.sort());
});

it("the database knows the moves of rounds that the domain knows, with who makes them", async () => {
  const rows = await db.owner("round_transition").select("*");
  const stored = rows.map((row) => line(row.from_state, row.to_state, row.movers, row.needs_reason));
  const known = ROUND_MOVES.map((move) => line(move.from, move.to, move.by, move.needsReason));
  expect(stored.sort()).toEqual(known.sort());
});
