import type { Engine } from "./engine";
import { ServiceError, notSupported } from "./errors";
import type { Exchange, Route } from "./http";
import { ok, readJson } from "./http";
import { isRecord } from "./paths";
import { readCount } from "./search-params";
import { kind } from "./settings-check";
import { describeBatch, listBatches, listTasks, selectTasks } from "./task-query";

/** Version of the service whose interface is followed here. */
const PACKAGE_VERSION = "1.50.0";
const FEATURES = [
  "chatCompletions",
  "compositeEmbedders",
  "containsFilter",
  "dynamicSearchRules",
  "editDocumentsByFunction",
  "foreignKeys",
  "getTaskDocumentsRoute",
  "logsRoute",
  "metrics",
  "multimodal",
  "network",
  "renderRoute",
];

/** Health, version, tasks, keys and features. */
export function serverRoutes(engine: Engine): Route[] {
  const { tasks, keys } = engine;
  const visibleTasks = ({ caller }: Exchange): ReturnType<typeof tasks.all> =>
    tasks.all().filter((task) => task.indexUid === null || caller.allows("tasks.get", task.indexUid));
  const features = (): Record<string, boolean> =>
    Object.fromEntries(FEATURES.map((name) => [name, name === "containsFilter" && engine.containsFilter]));
  return [
    { method: "GET", path: "/health", action: undefined, handle: () => ok({ status: "available" }) },
    {
      method: "GET",
      path: "/version",
      action: "version",
      handle: () => ok({ commitSha: "stand-in", commitDate: "unknown", pkgVersion: PACKAGE_VERSION }),
    },
    {
      method: "GET",
      path: "/tasks",
      action: "tasks.get",
      handle: (exchange) => ok(listTasks(visibleTasks(exchange), exchange.query)),
    },
    {
      method: "GET",
      path: "/tasks/:uid",
      action: "tasks.get",
      handle: (exchange) => {
        const uid = readCount("uid", exchange.params.uid ?? "", "invalid_task_uids");
        const task = tasks.get(uid);
        if (task.indexUid === null || exchange.caller.allows("tasks.get", task.indexUid)) return ok(task);
        throw new ServiceError("task_not_found", `Task \`${uid}\` not found.`);
      },
    },
    {
      method: "GET",
      path: "/batches",
      action: "tasks.get",
      handle: (exchange) => ok(listBatches(visibleTasks(exchange), exchange.query)),
    },
    {
      method: "GET",
      path: "/batches/:uid",
      action: "tasks.get",
      handle: (exchange) => {
        const uid = readCount("uid", exchange.params.uid ?? "", "invalid_batch_uids");
        const task = visibleTasks(exchange).find((each) => each.batchUid === uid);
        if (task === undefined) throw new ServiceError("batch_not_found", `Batch \`${uid}\` not found.`);
        return ok(describeBatch(task));
      },
    },
    {
      method: "POST",
      path: "/tasks/cancel",
      action: "tasks.cancel",
      handle: (exchange) => {
        const uids = selectTasks(visibleTasks(exchange), exchange.query, "cancel");
        const details = { matchedTasks: uids.length, canceledTasks: null, originalFilter: `?${exchange.query}` };
        const work = (task: { uid: number; details: unknown }): void => {
          task.details = { ...details, canceledTasks: tasks.cancel(uids, task.uid) };
        };
        return ok(tasks.enqueue("taskCancelation", null, details, work));
      },
    },
    {
      method: "DELETE",
      path: "/tasks",
      action: "tasks.delete",
      handle: (exchange) => {
        const uids = selectTasks(visibleTasks(exchange), exchange.query, "delete");
        const details = { matchedTasks: uids.length, deletedTasks: null, originalFilter: `?${exchange.query}` };
        const work = (task: { details: unknown }): void => {
          task.details = { ...details, deletedTasks: tasks.forget(uids) };
        };
        return ok(tasks.enqueue("taskDeletion", null, details, work));
      },
    },
    {
      method: "GET",
      path: "/keys",
      action: "keys.get",
      handle: ({ query }) => {
        const offset = readCount("offset", query.get("offset") ?? "0", "invalid_api_key_offset");
        const limit = readCount("limit", query.get("limit") ?? "20", "invalid_api_key_limit");
        const all = keys.list();
        return ok({ results: all.slice(offset, offset + limit), offset, limit, total: all.length });
      },
    },
    {
      method: "POST",
      path: "/keys",
      action: "keys.create",
      handle: async (exchange) => ({ status: 201, body: keys.create(await readJson(exchange)) }),
    },
    { method: "GET", path: "/keys/:key", action: "keys.get", handle: ({ params }) => ok(keys.get(params.key ?? "")) },
    {
      method: "PATCH",
      path: "/keys/:key",
      action: "keys.update",
      handle: async (exchange) => ok(keys.update(exchange.params.key ?? "", await readJson(exchange))),
    },
    {
      method: "DELETE",
      path: "/keys/:key",
      action: "keys.delete",
      handle: ({ params }) => {
        keys.delete(params.key ?? "");
        return { status: 204 };
      },
    },
    { method: "GET", path: "/experimental-features", action: "experimental.get", handle: () => ok(features()) },
    {
      method: "PATCH",
      path: "/experimental-features",
      action: "experimental.update",
      handle: async (exchange) => {
        const body = await readJson(exchange);
        if (!isRecord(body)) {
          throw new ServiceError("bad_request", `Invalid value type: expected an object, but found ${kind(body)}`);
        }
        for (const [name, value] of Object.entries(body)) {
          if (!FEATURES.includes(name)) {
            const list = FEATURES.map((each) => `\`${each}\``).join(", ");
            throw new ServiceError("bad_request", `Unknown field \`${name}\`: expected one of ${list}`);
          }
          if (value === true && name !== "containsFilter") throw notSupported(`The feature \`${name}\``);
        }
        if (typeof body.containsFilter === "boolean") engine.containsFilter = body.containsFilter;
        return ok(features());
      },
    },
  ];
}

/** Routes of the service that this server refuses, with the permission that the service would ask for first. */
const REFUSED: readonly [method: string, path: string, action: string][] = [
  ["POST", "/indexes/:index/similar", "search"],
  ["GET", "/indexes/:index/similar", "search"],
  ["POST", "/indexes/:index/documents/edit", "documents.add"],
  ["POST", "/indexes/:index/compact", "indexes.compact"],
  ["POST", "/indexes/:index/fields", "indexes.get"],
  ["GET", "/indexes/:index/settings/chat", "settings.get"],
  ["PUT", "/indexes/:index/settings/chat", "settings.update"],
  ["PATCH", "/indexes/:index/settings/chat", "settings.update"],
  ["DELETE", "/indexes/:index/settings/chat", "settings.update"],
  ["GET", "/indexes/:index/settings/foreign-keys", "settings.get"],
  ["PUT", "/indexes/:index/settings/foreign-keys", "settings.update"],
  ["DELETE", "/indexes/:index/settings/foreign-keys", "settings.update"],
  ["GET", "/tasks/:uid/documents", "tasks.get"],
  ["POST", "/dumps", "dumps.create"],
  ["POST", "/snapshots", "snapshots.create"],
  ["POST", "/export", "export"],
  ["GET", "/metrics", "metrics.get"],
  ["GET", "/network", "network.get"],
  ["PATCH", "/network", "network.update"],
  ["GET", "/webhooks", "webhooks.get"],
  ["POST", "/webhooks", "webhooks.create"],
  ["GET", "/webhooks/:uid", "webhooks.get"],
  ["PATCH", "/webhooks/:uid", "webhooks.update"],
  ["DELETE", "/webhooks/:uid", "webhooks.delete"],
  ["GET", "/chats", "chats.get"],
  ["GET", "/chats/:uid", "chats.get"],
  ["GET", "/chats/:uid/settings", "chatsSettings.get"],
  ["PATCH", "/chats/:uid/settings", "chatsSettings.update"],
  ["DELETE", "/chats/:uid/settings", "chatsSettings.update"],
  ["POST", "/chats/:uid/chat/completions", "chatCompletions"],
  ["POST", "/dynamic-search-rules", "settings.get"],
  ["GET", "/dynamic-search-rules/:uid", "settings.get"],
  ["PATCH", "/dynamic-search-rules/:uid", "settings.update"],
  ["DELETE", "/dynamic-search-rules/:uid", "settings.update"],
  ["POST", "/render-template", "settings.get"],
];

export function refusedRoutes(): Route[] {
  return REFUSED.map(([method, path, action]) => ({
    method,
    path,
    action,
    handle: () => {
      throw notSupported(`${method} ${path}`, "feature_not_enabled");
    },
  }));
}
