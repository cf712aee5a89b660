import { createHmac, randomUUID } from "node:crypto";
import { afterAll, beforeAll, describe, expect, test } from "vitest";
import { clientOf, freshIndexName, openSearchService, type SearchService } from "../setup/search-service";

let service: SearchService;
beforeAll(async () => {
  service = await openSearchService();
});
afterAll(() => service.close());
const code = (expected: string) => ({ cause: expect.objectContaining({ code: expected }) as unknown });

describe("keys", () => {
  test("the default ones are there", async () => {
    const { results } = await service.client.getKeys({ limit: 100 });
    const names = results.map((key) => key.name);
    expect(names).toEqual(expect.arrayContaining(["Default Search API Key", "Default Admin API Key"]));
  });

  test("a key is the HMAC-SHA256 of its identifier under the master key", async () => {
    const uid = randomUUID();
    const key = await service.client.createKey({ uid, actions: ["search"], indexes: ["designs"], expiresAt: null });
    expect(key.key).toBe(createHmac("sha256", service.masterKey).update(uid).digest("hex"));
    expect(await service.client.getKey(uid)).toEqual(key);
    await service.client.deleteKey(uid);
    await expect(service.client.getKey(uid)).rejects.toMatchObject(code("api_key_not_found"));
  });

  test("a search key searches its index and nothing else", async () => {
    const [mine, other] = [freshIndexName(), freshIndexName()];
    for (const uid of [mine, other])
      await service.client
        .index(uid)
        .addDocuments([{ id: 1 }])
        .waitTask();
    const key = await service.client.createKey({ actions: ["search"], indexes: [mine], expiresAt: null });
    const reader = clientOf(service.url, key.key);
    expect((await reader.index(mine).search("")).hits).toHaveLength(1);
    for (const refused of [
      () => reader.index(other).search(""),
      () => reader.multiSearch({ queries: [{ indexUid: mine }, { indexUid: other }] }),
      () => reader.index(mine).getDocuments(),
      () => reader.index(mine).addDocuments([]),
      () => reader.index(mine).getSettings(),
      () => reader.getRawIndexes(),
      () => reader.getStats(),
      () => reader.tasks.getTasks(),
      () => reader.getKeys(),
      () => reader.swapIndexes([{ indexes: [mine, other], rename: false }]),
    ]) {
      await expect(refused()).rejects.toMatchObject(code("invalid_api_key"));
    }
    await service.client.deleteKey(key.uid);
    await expect(reader.index(mine).search("")).rejects.toMatchObject(code("invalid_api_key"));
    for (const uid of [mine, other]) await service.client.deleteIndex(uid).waitTask();
  });

  test("a sender's key works on the indexes of its pattern, swaps included", async () => {
    const name = freshIndexName();
    const key = await service.client.createKey({
      actions: ["documents.*", "settings.*", "indexes.*", "indexes.swap", "tasks.get"],
      indexes: [`${name}*`],
      expiresAt: null,
    });
    const sender = clientOf(service.url, key.key);
    for (const uid of [name, `${name}-build`])
      await sender
        .index(uid)
        .addDocuments([{ id: 1 }])
        .waitTask();
    expect((await sender.swapIndexes([{ indexes: [name, `${name}-build`], rename: false }]).waitTask()).status).toBe(
      "succeeded",
    );
    await expect(sender.index(freshIndexName()).addDocuments([{ id: 1 }])).rejects.toMatchObject(
      code("invalid_api_key"),
    );
    await expect(sender.index(name).search("")).rejects.toMatchObject(code("invalid_api_key"));
    const { results } = await sender.getRawIndexes();
    expect(results.map((each) => each.uid).sort()).toEqual([name, `${name}-build`]);
    for (const uid of [name, `${name}-build`]) await service.client.deleteIndex(uid).waitTask();
    await service.client.deleteKey(key.uid);
  });

  test("name and description may change, the rest not", async () => {
    const key = await service.client.createKey({ actions: ["search"], indexes: ["*"], expiresAt: null });
    expect(await service.client.updateKey(key.uid, { name: "reader" })).toMatchObject({
      name: "reader",
      actions: ["search"],
    });
    await expect(service.client.updateKey(key.uid, { actions: ["*"] } as never)).rejects.toMatchObject(
      code("immutable_api_key_actions"),
    );
    await service.client.deleteKey(key.uid);
  });

  test.each([
    ["no actions", { indexes: ["*"], expiresAt: null }, "missing_api_key_actions"],
    ["no indexes", { actions: ["search"], expiresAt: null }, "missing_api_key_indexes"],
    ["no end", { actions: ["search"], indexes: ["*"] }, "missing_api_key_expires_at"],
    ["an unknown action", { actions: ["dance"], indexes: ["*"], expiresAt: null }, "invalid_api_key_actions"],
    [
      "an end in the past",
      { actions: ["search"], indexes: ["*"], expiresAt: "2001-01-01T00:00:00Z" },
      "invalid_api_key_expires_at",
    ],
  ])("%s is refused", async (_, body, expected) => {
    await expect(service.client.createKey(body as never)).rejects.toMatchObject(code(expected));
  });
});
