import { afterAll, afterEach, beforeAll, beforeEach, describe, expect, test } from "vitest";
import { deleteOutboxRows, outboxRows } from "@/db/queries/search-outbox";
import { searchBuild, searchState } from "@/db/queries/search-build";
import { takeSenderLock } from "@/db/queries/search-lock";
import { adoptEnvironment } from "@/lib/env/env";
import { compareIndex } from "@/lib/server/search/compare";
import type { Outlet } from "@/lib/server/search/outlet";
import { publicDocuments, sendEntries } from "@/lib/server/search/send-entries";
import { runSearchSender, takeTurn } from "@/lib/server/search/sender";
import { indexDigest } from "@/search/document";
import { DESIGNS_INDEX } from "@/search/settings";
import { startSearchStandIn, type StandIn } from "@/search/stand-in/server";
import { setUpDatabase } from "@/tests/setup/database";
import { indexedIds, layOutField, outletOf, settle } from "@/tests/setup/search-field";

const database = setUpDatabase();
const apiKey = "sender-test-key";
let standIn: StandIn;
let from: Outlet;

beforeAll(async () => {
  adoptEnvironment({ LOG_LEVEL: "silent" });
  await layOutField(database.owner, 120);
});
beforeEach(async () => {
  standIn = await startSearchStandIn({ port: 0, masterKey: apiKey });
  from = outletOf(database.app, standIn.url, apiKey);
});
afterEach(() => standIn.close());
afterAll(() => adoptEnvironment({ LOG_LEVEL: "info" }));

const publicIds = async (): Promise<string[]> => {
  const rows: { entry_id: string }[] = await database.public("shown.entry").select("entry_id");
  return rows.map((row) => row.entry_id).sort();
};
const waiting = async (): Promise<string[]> =>
  (await outboxRows(database.app, { limit: 10_000 })).map((row) => row.entryId).sort();
const clear = async (): Promise<void> =>
  deleteOutboxRows(database.app, { ids: (await outboxRows(database.app, { limit: 10_000 })).map((row) => row.id) });

describe("every change that the index shows marks its entries in the same transaction", () => {
  const marks = async (change: (tx: typeof database.owner) => Promise<unknown>): Promise<string[]> => {
    await clear();
    await database.owner
      .transaction(async (tx) => {
        await change(tx);
        throw new Error("taken back");
      })
      .catch(() => undefined);
    expect(await waiting(), "what is taken back marks nothing").toEqual([]);
    await database.owner.transaction(change);
    return [...new Set(await waiting())];
  };

  test("the read model's row, and with it publication, correction, withdrawal and ranks", async () => {
    const [id = ""] = await publicIds();
    const row = await database.owner("published_entry").where({ entry_id: id }).first();
    expect(await marks((tx) => tx("published_entry").where({ entry_id: id }).update({ corrections: 1 }))).toEqual([id]);
    expect(await marks((tx) => tx("published_entry").where({ entry_id: id }).delete())).toEqual([id]);
    await clear();
    await database.owner("published_entry").insert(row);
    expect(await waiting()).toEqual([id]);
  });

  test("a design's name, its owners, an owner's handle, a season's title", async () => {
    const entry = await database.owner("published_entry").first();
    const ofDesign: { entry_id: string }[] = await database
      .owner("published_entry")
      .where({ design_id: entry.design_id })
      .select("entry_id");
    const ids = ofDesign.map((each) => each.entry_id).sort();
    const owner = await database.owner("design_owner").where({ design_id: entry.design_id }).first();
    expect(await marks((tx) => tx("design").where({ id: entry.design_id }).update({ name: "Other Mill" }))).toEqual(
      ids,
    );
    expect(await marks((tx) => tx("design_owner").where({ id: owner.id }).update({ until_at: tx.fn.now() }))).toEqual(
      ids,
    );
    await database.owner("design_owner").where({ id: owner.id }).update({ until_at: null });
    const handled = await marks((tx) => tx("person").where({ id: owner.person_id }).update({ handle: "renamed-one" }));
    expect(handled).toEqual(expect.arrayContaining(ids));
    expect(await marks((tx) => tx("season").where({ id: entry.season_id }).update({ title: "Spring season" }))).toEqual(
      await publicIds(),
    );
    expect(await marks((tx) => tx("season").where({ id: entry.season_id }).update({ closed_at: tx.fn.now() }))).toEqual(
      [],
    );
  });
});

describe("the sender", () => {
  test("fills an index that is missing, under our settings, and then sends what changes", async () => {
    await settle(from);
    expect(await indexedIds(from)).toEqual(await publicIds());
    expect(await searchState(database.app)).toMatchObject({ settingsSha256: indexDigest() });
    expect(await searchBuild(database.app)).toBeUndefined();
    const [id = ""] = await publicIds();
    const row = await database.owner("published_entry").where({ entry_id: id }).first();
    await database.owner("published_entry").where({ entry_id: id }).delete();
    await settle(from);
    expect(await indexedIds(from)).not.toContain(id);
    await database.owner("published_entry").insert(row);
    await settle(from);
    expect(await indexedIds(from)).toEqual(await publicIds());
    expect(await waiting()).toEqual([]);
  });

  test("readers search the old index until the new one holds everything", async () => {
    await settle(from);
    await database.app("search_state").update({ settings_sha256: "0".repeat(64) });
    await takeTurn(from);
    const build = await searchBuild(database.app);
    expect(build?.indexUid).toMatch(/^designs_build_\d+$/);
    expect((await indexedIds(from)).length).toBe(120);
    const [id = ""] = await publicIds();
    await database.owner("design").update({ name: "Renamed while it is rebuilt" });
    await settle(from);
    expect((await indexedIds(from)).length).toBe(120);
    const document = await from.client().index<{ name: string }>(DESIGNS_INDEX).getDocument(id);
    expect(document.name).toBe("Renamed while it is rebuilt");
  });

  test("an index that a late write made by itself, without settings, is rebuilt", async () => {
    await settle(from);
    await from.client().deleteIndex(DESIGNS_INDEX).waitTask();
    const documents = await publicDocuments(database.app)(await publicIds());
    await from.client().index(DESIGNS_INDEX).addDocuments(documents, { primaryKey: "id" }).waitTask();
    await settle(from);
    const { rankingRules } = await from.client().index(DESIGNS_INDEX).getSettings();
    expect(rankingRules?.[0]).toBe("sort");
  });

  test("a sender that ended while indexes were exchanged leaves a rebuild that begins anew", async () => {
    await settle(from);
    await database.app("search_state").update({ settings_sha256: null });
    await takeTurn(from);
    await database.app("search_build").update({ swapping: true });
    const first = await searchBuild(database.app);
    const stop = new AbortController();
    const sender = runSearchSender(stop.signal, from);
    await expect
      .poll(async () => (await searchState(database.app)).settingsSha256, { timeout: 20_000 })
      .toBe(indexDigest());
    stop.abort();
    await sender;
    expect(await searchBuild(database.app)).toBeUndefined();
    const { results } = await from.client().getIndexes();
    expect(results.map(({ uid }) => uid)).not.toContain(first?.indexUid);
    expect(await indexedIds(from)).toEqual(await publicIds());
  });

  test("one entry that the service refuses is set aside; its neighbours are sent, and later it is too", async () => {
    await settle(from);
    const ids = (await publicIds()).slice(0, 9);
    const bad = ids[4] ?? "";
    await from.client().index(DESIGNS_INDEX).deleteDocuments(ids).waitTask();
    const good = publicDocuments(database.app);
    await sendEntries(from, [DESIGNS_INDEX], ids, async (asked) =>
      (await good(asked)).map((document) => (document.id === bad ? { ...document, id: "not an id" } : document)),
    );
    expect(await database.app("search_dead_letter").select("entry_id")).toEqual([{ entry_id: bad }]);
    expect((await indexedIds(from)).filter((id) => ids.includes(id))).toEqual(ids.filter((id) => id !== bad));
    await sendEntries(from, [DESIGNS_INDEX], [bad]);
    expect(await database.app("search_dead_letter").select("entry_id")).toEqual([]);
    expect(await indexedIds(from)).toEqual(await publicIds());
  });

  test("of two on one database one is the sender, and a mark wakes it at once", async () => {
    const lock = await takeSenderLock(database.app);
    expect(await takeSenderLock(database.app)).toBeUndefined();
    const never = new AbortController();
    const woken = lock?.woken(60_000, never.signal);
    await database.owner("design").update({ summary: "marks" });
    await woken;
    await lock?.release();
    const next = await takeSenderLock(database.app);
    expect(next).toBeDefined();
    await next?.release();
  });
});

test("the nightly comparison reports what differs and mends it", async () => {
  await settle(from);
  const ids = await publicIds();
  const [missing = "", stale = ""] = ids;
  const index = from.client().index(DESIGNS_INDEX);
  await index.deleteDocument(missing).waitTask();
  await index.updateDocuments([{ id: stale, name: "Not its name", rev: "old" }]).waitTask();
  await index.addDocuments([{ id: "0190a000-0000-7000-8000-00000000dead", rev: "x" }]).waitTask();
  expect((await compareIndex(from))?.sort()).toEqual([missing, stale, "0190a000-0000-7000-8000-00000000dead"].sort());
  expect(await searchState(database.app)).toMatchObject({ differences: 3 });
  await settle(from);
  expect(await indexedIds(from)).toEqual(ids);
  expect(await compareIndex(from)).toEqual([]);
});
