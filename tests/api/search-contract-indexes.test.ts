import { afterAll, beforeAll, describe, expect, test } from "vitest";
import { clientOf, freshIndexName, openSearchService, type SearchService } from "../setup/search-service";

let service: SearchService;
beforeAll(async () => {
  service = await openSearchService();
});
afterAll(() => service.close());

const code = (expected: string) => ({ cause: expect.objectContaining({ code: expected }) as unknown });

describe("indexes are created, changed and removed by tasks", () => {
  test("create, read, list, delete", async () => {
    const uid = freshIndexName();
    const created = await service.client.createIndex(uid, { primaryKey: "id" }).waitTask();
    expect(created).toMatchObject({
      status: "succeeded",
      type: "indexCreation",
      indexUid: uid,
      details: { primaryKey: "id" },
    });
    const raw = await service.client.getRawIndex(uid);
    expect(Object.keys(raw).sort()).toEqual(["createdAt", "primaryKey", "uid", "updatedAt"]);
    const { results, total } = await service.client.getRawIndexes({ limit: 1000 });
    expect(results.map((each) => each.uid)).toContain(uid);
    expect(total).toBeGreaterThanOrEqual(results.length);
    expect((await service.client.deleteIndex(uid).waitTask()).status).toBe("succeeded");
    await expect(service.client.getRawIndex(uid)).rejects.toMatchObject(code("index_not_found"));
  });

  test("what can't be done fails the task, not the request", async () => {
    const uid = freshIndexName();
    await service.client.createIndex(uid).waitTask();
    const again = await service.client.createIndex(uid).waitTask();
    expect(again).toMatchObject({ status: "failed", error: { code: "index_already_exists", type: "invalid_request" } });
    await service.client.deleteIndex(uid).waitTask();
    const gone = await service.client.deleteIndex(uid).waitTask();
    expect(gone).toMatchObject({ status: "failed", error: { code: "index_not_found" } });
  });

  test("a bad name is refused at once", async () => {
    await expect(service.client.createIndex("not a name")).rejects.toMatchObject(code("invalid_index_uid"));
  });

  test("the primary key can change while there is no document", async () => {
    const uid = freshIndexName();
    await service.client.createIndex(uid, { primaryKey: "id" }).waitTask();
    await service.client.index(uid).update({ primaryKey: "slug" }).waitTask();
    expect((await service.client.getRawIndex(uid)).primaryKey).toBe("slug");
    await service.client
      .index(uid)
      .addDocuments([{ slug: "heronwing" }])
      .waitTask();
    const refused = await service.client.index(uid).update({ primaryKey: "id" }).waitTask();
    expect(refused.error?.code).toBe("index_primary_key_already_exists");
    await service.client.deleteIndex(uid).waitTask();
  });

  test("statistics count documents and fields", async () => {
    const uid = freshIndexName();
    await service.client
      .index(uid)
      .addDocuments([{ id: 1, a: 1 }, { id: 2 }])
      .waitTask();
    const stats = await service.client.index(uid).getStats();
    expect(stats).toMatchObject({ numberOfDocuments: 2, isIndexing: false, fieldDistribution: { a: 1, id: 2 } });
    expect((await service.client.getStats()).indexes[uid]?.numberOfDocuments).toBe(2);
    await service.client.deleteIndex(uid).waitTask();
  });
});

describe("swapping exchanges two indexes in one task", () => {
  test("documents and settings go along", async () => {
    const [a, b] = [freshIndexName(), freshIndexName()];
    await service.client.index(a).updateFilterableAttributes(["x"]).waitTask();
    await service.client
      .index(a)
      .addDocuments([{ id: 1, from: "a" }])
      .waitTask();
    await service.client
      .index(b)
      .addDocuments([{ id: 1, from: "b" }])
      .waitTask();
    const task = await service.client.swapIndexes([{ indexes: [a, b], rename: false }]).waitTask();
    expect(task).toMatchObject({ status: "succeeded", type: "indexSwap", indexUid: null });
    expect(await service.client.index(a).getDocument(1)).toMatchObject({ from: "b" });
    expect(await service.client.index(b).getFilterableAttributes()).toEqual(["x"]);
    for (const uid of [a, b]) await service.client.deleteIndex(uid).waitTask();
  });

  test("nothing moves when one is missing", async () => {
    const [a, missing] = [freshIndexName(), freshIndexName()];
    await service.client
      .index(a)
      .addDocuments([{ id: 1 }])
      .waitTask();
    const task = await service.client.swapIndexes([{ indexes: [a, missing], rename: false }]).waitTask();
    expect(task).toMatchObject({ status: "failed", error: { code: "index_not_found" } });
    expect((await service.client.index(a).getStats()).numberOfDocuments).toBe(1);
    await service.client.deleteIndex(a).waitTask();
  });

  test("an index is named once, and two make a swap", async () => {
    await expect(service.client.swapIndexes([{ indexes: ["a", "a"], rename: false }])).rejects.toMatchObject(
      code("invalid_swap_duplicate_index_found"),
    );
    const three = [{ indexes: ["a", "b", "c"] as unknown as [string, string], rename: false }];
    await expect(service.client.swapIndexes(three)).rejects.toMatchObject(code("invalid_swap_indexes"));
  });
});

describe("the service tells its state and checks its callers", () => {
  test("health is open to all", async () => {
    expect(await clientOf(service.url, "").health()).toEqual({ status: "available" });
  });

  test("version needs a key", async () => {
    expect(await service.client.getVersion()).toHaveProperty("pkgVersion", expect.stringMatching(/^\d+\.\d+\.\d+$/));
    await expect(clientOf(service.url, "wrong").getVersion()).rejects.toMatchObject(code("invalid_api_key"));
  });

  test("no header is 401, a wrong key 403, and an error has exactly four keys", async () => {
    const none = await fetch(`${service.url}/indexes`);
    expect(none.status).toBe(401);
    expect(await none.json()).toEqual({
      message: "The Authorization header is missing. It must use the bearer authorization method.",
      code: "missing_authorization_header",
      type: "auth",
      link: "https://docs.meilisearch.com/errors#missing_authorization_header",
    });
    const wrong = await fetch(`${service.url}/indexes`, { headers: { authorization: "Bearer wrong" } });
    expect([wrong.status, Object.keys((await wrong.json()) as object).sort()]).toEqual([
      403,
      ["code", "link", "message", "type"],
    ]);
  });

  test("an unknown route is 404", async () => {
    const answer = await fetch(`${service.url}/nowhere`, { headers: { authorization: `Bearer ${service.masterKey}` } });
    expect(answer.status).toBe(404);
  });
});
