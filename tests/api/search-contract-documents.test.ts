import { afterAll, beforeAll, beforeEach, describe, expect, test } from "vitest";
import type { Index } from "meilisearch";
import { freshIndexName, openSearchService, type SearchService } from "../setup/search-service";

let service: SearchService;
let index: Index;
beforeAll(async () => {
  service = await openSearchService();
});
afterAll(() => service.close());
beforeEach(async () => {
  index = service.client.index(freshIndexName());
  await index.updateFilterableAttributes(["stages"]).waitTask();
  return async () => void (await index.delete().waitTask());
});

const FANS = [
  { id: 3, name: "Heronwing", stages: 1 },
  { id: 1, name: "Slow Mill", stages: 2 },
  { id: 2, name: "Paper Lantern", stages: 2 },
];
const code = (expected: string) => ({ cause: expect.objectContaining({ code: expected }) as unknown });

describe("writing", () => {
  test("a write is visible when its task is done, not before", async () => {
    const enqueued = await index.addDocuments(FANS);
    expect(Object.keys(enqueued).sort()).toEqual(["enqueuedAt", "indexUid", "status", "taskUid", "type"]);
    expect(enqueued).toMatchObject({ status: "enqueued", type: "documentAdditionOrUpdate" });
    const task = await service.client.tasks.waitForTask(enqueued);
    expect(task).toMatchObject({ status: "succeeded", details: { receivedDocuments: 3, indexedDocuments: 3 } });
    expect((await index.getDocuments()).total).toBe(3);
  });

  test("adding replaces, updating merges top-level fields", async () => {
    await index.addDocuments(FANS).waitTask();
    await index.updateDocuments([{ id: 1, stages: 3 }]).waitTask();
    expect(await index.getDocument(1)).toEqual({ id: 1, name: "Slow Mill", stages: 3 });
    await index.addDocuments([{ id: 1, stages: 4 }]).waitTask();
    expect(await index.getDocument(1)).toEqual({ id: 1, stages: 4 });
  });

  test("one object a line is read as well", async () => {
    const lines = FANS.map((fan) => JSON.stringify(fan)).join("\n");
    const task = await index.addDocumentsFromString(lines, "application/x-ndjson").waitTask();
    expect(task.details?.receivedDocuments).toBe(3);
  });

  test.each([
    ["a bad identifier", [{ id: "a b" }], "invalid_document_id"],
    ["a fraction for one", [{ id: 1.5 }], "invalid_document_id"],
    ["none where the first had one", [{ id: 1 }, { name: "x" }], "missing_document_id"],
    ["two fields that could be it", [{ id: 1, uid: 2 }], "index_primary_key_multiple_candidates_found"],
    ["no field that could be it", [{ name: "x" }], "index_primary_key_no_candidate_found"],
  ])("%s fails the whole task", async (_, documents, expected) => {
    const task = await index.addDocuments(documents).waitTask();
    expect(task).toMatchObject({ status: "failed", error: { code: expected } });
    expect((await index.getDocuments()).total).toBe(0);
  });

  test("a payload that isn't JSON is refused at once", async () => {
    await expect(index.addDocumentsFromString("[{", "application/json")).rejects.toMatchObject(
      code("malformed_payload"),
    );
  });
});

describe("reading", () => {
  beforeEach(() => index.addDocuments(FANS, { primaryKey: "id" }).waitTask());

  test("one, with chosen fields, and a missing one", async () => {
    expect(await index.getDocument(3, { fields: ["name"] })).toEqual({ name: "Heronwing" });
    await expect(index.getDocument(99)).rejects.toMatchObject(code("document_not_found"));
  });

  test("pages in a stable order", async () => {
    const first = await index.getDocuments({ limit: 2, fields: ["id"] });
    const second = await index.getDocuments({ limit: 2, offset: 2, fields: ["id"] });
    expect(first).toMatchObject({ limit: 2, offset: 0, total: 3 });
    expect([...first.results, ...second.results]).toHaveLength(3);
    expect(new Set([...first.results, ...second.results].map((each) => each.id)).size).toBe(3);
  });

  test("by filter and by identifiers", async () => {
    const found = await index.getDocuments({ filter: "stages = 2" });
    expect(found.results.map((each) => each.id).sort()).toEqual([1, 2]);
    expect((await index.getDocuments({ ids: [1, 3] })).total).toBe(2);
    await expect(index.getDocuments({ filter: "name = x" })).rejects.toMatchObject(code("invalid_document_filter"));
  });
});

describe("deleting", () => {
  beforeEach(() => index.addDocuments(FANS, { primaryKey: "id" }).waitTask());

  test("one, several, by filter, all", async () => {
    expect((await index.deleteDocument(3).waitTask()).details).toMatchObject({ deletedDocuments: 1 });
    expect((await index.deleteDocuments([1, 77]).waitTask()).details).toMatchObject({
      providedIds: 2,
      deletedDocuments: 1,
    });
    const task = await index.deleteDocuments({ filter: [["stages = 2", "stages = 1"]] }).waitTask();
    expect(task).toMatchObject({ type: "documentDeletion", details: { deletedDocuments: 1 } });
    await index.addDocuments(FANS).waitTask();
    expect((await index.deleteAllDocuments().waitTask()).details).toMatchObject({ deletedDocuments: 3 });
    expect((await index.search("mill")).hits).toEqual([]);
  });

  test("a deleted document is found by no word, filter or count; a new one in its place is itself", async () => {
    await index.deleteDocument(1).waitTask();
    await index.addDocuments([{ id: 9, name: "Kite", stages: 7 }]).waitTask();
    expect((await index.search("slow")).hits).toEqual([]);
    expect((await index.search("kite")).hits).toHaveLength(1);
    const { facetDistribution } = await index.search("", { facets: ["stages"] });
    expect(facetDistribution).toEqual({ stages: { 1: 1, 2: 1, 7: 1 } });
  });

  test("no filter, or an empty one, deletes nothing", async () => {
    await expect(index.deleteDocuments({ filter: "" })).rejects.toMatchObject(code("invalid_document_filter"));
    await expect(index.deleteDocuments({} as { filter: string })).rejects.toMatchObject(
      code("missing_document_filter"),
    );
  });
});
