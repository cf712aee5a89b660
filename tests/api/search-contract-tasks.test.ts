import { afterAll, beforeAll, describe, expect, test } from "vitest";
import type { EnqueuedTask, Index } from "meilisearch";
import { freshIndexName, openSearchService, type SearchService } from "../setup/search-service";

let service: SearchService;
let index: Index;
beforeAll(async () => {
  service = await openSearchService();
  index = service.client.index(freshIndexName());
  await service.client.createIndex(index.uid, { primaryKey: "id" }).waitTask();
});
afterAll(async () => {
  await index.delete().waitTask();
  await service.close();
});
const code = (expected: string) => ({ cause: expect.objectContaining({ code: expected }) as unknown });
const tasks = () => service.client.tasks;

describe("tasks", () => {
  test("are done in the order in which they came", async () => {
    const enqueued: EnqueuedTask[] = [];
    for (const step of [1, 2, 3, 4]) enqueued.push(await index.addDocuments([{ id: 1, step }]));
    const done = await tasks().waitForTasks(enqueued);
    const uids = done.map((task) => task.uid);
    expect(uids).toEqual([...uids].sort((a, b) => a - b));
    const finished = done.map((task) => Date.parse(task.finishedAt ?? ""));
    expect(finished).toEqual([...finished].sort((a, b) => a - b));
    expect(await index.getDocument(1)).toEqual({ id: 1, step: 4 });
  });

  test("tell what was done, when and for how long", async () => {
    const task = await index.addDocuments([{ id: 2 }]).waitTask();
    expect(await tasks().getTask(task.uid)).toEqual(task);
    expect(task).toMatchObject({
      indexUid: index.uid,
      canceledBy: null,
      error: null,
      duration: expect.stringMatching(/^PT[\d.]+S$/) as unknown,
    });
    expect([task.enqueuedAt, task.startedAt, task.finishedAt].every((at) => !Number.isNaN(Date.parse(at ?? "")))).toBe(
      true,
    );
  });

  test("waiting for less than a task takes ends in a time-out, not in a false answer", async () => {
    await expect(index.addDocuments([{ id: 3 }]).waitTask({ timeout: 1 })).rejects.toHaveProperty(
      "name",
      "MeilisearchTaskTimeOutError",
    );
  });

  test("are listed newest first, a page at a time, and by filters", async () => {
    const first = await index.addDocuments([{ id: 4 }]).waitTask();
    const second = await index.deleteDocument(4).waitTask();
    const page = await tasks().getTasks({ indexUids: [index.uid], limit: 1 });
    expect(page).toMatchObject({ limit: 1, from: second.uid, next: first.uid });
    expect((await tasks().getTasks({ uids: [first.uid] })).results).toEqual([first]);
    const deletions = await tasks().getTasks({
      indexUids: [index.uid],
      types: ["documentDeletion"],
      statuses: ["succeeded"],
    });
    expect(deletions.results.map((task) => task.uid)).toContain(second.uid);
    expect(deletions.results.every((task) => task.type === "documentDeletion")).toBe(true);
    const oldest = await tasks().getTasks({ indexUids: [index.uid], reverse: true, limit: 1 });
    expect(oldest.results[0]?.type).toBe("indexCreation");
    expect((await tasks().getTasks({ indexUids: [index.uid], afterEnqueuedAt: "2999-01-01T00:00:00Z" })).total).toBe(0);
  });

  test("can be forgotten when they are finished", async () => {
    const task = await index.addDocuments([{ id: 5 }]).waitTask();
    const deletion = await tasks()
      .deleteTasks({ uids: [task.uid] })
      .waitTask();
    expect(deletion).toMatchObject({
      type: "taskDeletion",
      details: { matchedTasks: 1, deletedTasks: 1, originalFilter: `?uids=${task.uid}` },
    });
    await expect(tasks().getTask(task.uid)).rejects.toMatchObject(code("task_not_found"));
  });

  test("a cancelation says what it matched", async () => {
    const enqueued = await index.addDocuments([{ id: 6 }]);
    const task = await tasks()
      .cancelTasks({ uids: [enqueued.taskUid] })
      .waitTask();
    expect(task).toMatchObject({
      type: "taskCancelation",
      status: "succeeded",
      details: { originalFilter: `?uids=${enqueued.taskUid}` },
    });
    const after = await tasks().waitForTask(enqueued);
    expect(["canceled", "succeeded"]).toContain(after.status);
    const isThere = (await index.getDocuments({ ids: [6] })).total === 1;
    expect(isThere).toBe(after.status === "succeeded");
  });

  test.each([
    ["types", { types: ["wrong"] }, "invalid_task_types"],
    ["statuses", { statuses: ["wrong"] }, "invalid_task_statuses"],
    ["uids", { uids: ["wrong"] }, "invalid_task_uids"],
    ["dates", { beforeEnqueuedAt: "wrong" }, "invalid_task_before_enqueued_at"],
  ])("bad %s are refused", async (_, query, expected) => {
    await expect(tasks().getTasks(query as never)).rejects.toMatchObject(code(expected));
  });

  test("canceling or deleting all at once is refused", async () => {
    await expect(tasks().cancelTasks({})).rejects.toMatchObject(code("missing_task_filters"));
    await expect(tasks().deleteTasks({})).rejects.toMatchObject(code("missing_task_filters"));
  });
});
