import { expect, test } from "vitest";
import { rankChanges } from "@/lib/domain/scoring/rank-changes";

const ranked = (...ids: (string | null)[][]) =>
  ids.flatMap((tied, i) => tied.flatMap((id) => (id === null ? [] : [{ id, rank: i + 1 }])));

// Worked by hand.
test("moves are counted among those that both rules rank, the furthest first", () => {
  const before = ranked(["a"], ["b"], ["c"], ["d"]);
  const after = ranked(["d"], ["a"], ["b"], ["c"]);
  expect(rankChanges(before, after)).toEqual({
    both: 4,
    moved: 4,
    firstBefore: ["a"],
    firstAfter: ["d"],
    movers: [
      { id: "d", from: 4, to: 1 },
      { id: "a", from: 1, to: 2 },
      { id: "b", from: 2, to: 3 },
      { id: "c", from: 3, to: 4 },
    ],
    onlyBefore: [],
    onlyAfter: [],
  });
});

test("nobody moves only because somebody else isn't ranked by one of the rules", () => {
  const before = [{ id: "x", rank: null }, ...ranked(["a"], ["b"], ["c"])];
  const after = ranked(["x"], ["a"], ["b"], ["c"]);
  const changes = rankChanges(before, after);
  expect([changes.both, changes.moved, changes.onlyAfter, changes.onlyBefore]).toEqual([3, 0, ["x"], []]);
});

test("ties share the lower number, also where one between them falls away", () => {
  const before = [
    { id: "a", rank: 1 },
    { id: "b", rank: 1 },
    { id: "c", rank: 3 },
  ];
  const after = [
    { id: "c", rank: 1 },
    { id: "a", rank: 2 },
    { id: "b", rank: 3 },
  ];
  const changes = rankChanges(before, after);
  expect(changes.firstBefore).toEqual(["a", "b"]);
  expect(changes.firstAfter).toEqual(["c"]);
  expect(changes.movers).toEqual([
    { id: "b", from: 1, to: 3 },
    { id: "c", from: 3, to: 1 },
    { id: "a", from: 1, to: 2 },
  ]);
});

test("two empty rankings have nobody and move nothing", () => {
  expect(rankChanges([], [])).toMatchObject({ both: 0, moved: 0, firstBefore: [], firstAfter: [], movers: [] });
});
