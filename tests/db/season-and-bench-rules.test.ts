import { beforeAll, expect, it } from "vitest";
import { moveEntries } from "@/db/queries/moves";
import { asOperator, makeBenchWorld, measureRound, type BenchWorld } from "../factories/measured-round";
import { setUpDatabase } from "../setup/database";

const db = setUpDatabase();
let world: BenchWorld;
let made: Awaited<ReturnType<typeof measureRound>>;

beforeAll(async () => {
  world = await makeBenchWorld(db.owner);
  made = await measureRound(world, { number: 1, ends: "measuring" });
});

it("one session is open on a bench at a time", async () => {
  const open = await db.owner("session").where({ id: made.sessionId }).first("*");
  const { id: _id, number: _number, ...same } = open ?? {};
  await expect(db.app("session").insert(same)).rejects.toMatchObject({
    code: "23505",
    constraint: "session_one_open",
  });
});

it("the first reading of a season freezes its rule, levels, protocol and budget, for the application and the owner", async () => {
  const season = await db.owner("season").where({ id: world.season.id }).first("frozen_at");
  expect(season?.frozen_at).toBeInstanceOf(Date);
  for (const role of [db.app, db.owner]) {
    const change = (columns: object) => role("season").where({ id: world.season.id }).update(columns);
    await expect(change({ levels_dba: [40, 46] })).rejects.toMatchObject({ code: "23001" });
    await expect(change({ headline_dba: 40 })).rejects.toMatchObject({ code: "23001" });
    await expect(change({ frozen_at: null })).rejects.toMatchObject({ code: "23001" });
    const protocol = role("protocol_version").where({ id: world.season.protocolVersionId });
    await expect(protocol.update({ epsilon_k: 5 })).rejects.toMatchObject({ code: "23001" });
    const budgetId = world.bench.versions[0]?.budgetId;
    await expect(role("budget_part").where({ budget_version_id: budgetId }).update({ u: 0 })).rejects.toMatchObject({
      code: "23001",
    });
  }
  await expect(db.app("season").where({ id: world.season.id }).update({ title: "Another title" })).resolves.toBe(1);
});

it("a state changes by a move alone, only along the table, and only from the state that it is in", async () => {
  const [entryId = ""] = made.entryIds;
  await expect(db.app("entry").where({ id: entryId }).update({ state: "published" })).rejects.toThrow(
    "by a move alone",
  );
  await expect(db.app("round").where({ id: made.roundId }).update({ state: "signed" })).rejects.toThrow(
    "by a move alone",
  );
  const by = { entryId, byPerson: asOperator(world).actor.personId };
  const move = (row: Pick<Parameters<typeof moveEntries>[1][number], "from" | "to" | "byRight">) =>
    moveEntries(db.app, [{ ...by, ...row }]);
  await expect(move({ from: "printing", to: "on_the_bench", byRight: "operator" })).rejects.toThrow("the entry is");
  await expect(move({ from: "on_the_bench", to: "published", byRight: "publication" })).rejects.toThrow("does not go");
  await expect(move({ from: "on_the_bench", to: "in_review", byRight: "host" })).rejects.toThrow("may not move");
  await expect(move({ from: "on_the_bench", to: "declined", byRight: "host" })).rejects.toThrow("needs a reason");
});
