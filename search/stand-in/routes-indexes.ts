import type { Engine, Swap } from "./engine";
import { ServiceError } from "./errors";
import type { Route } from "./http";
import { accepted, checkUid, indexUidOf, ok, readJson } from "./http";
import { invalidKey } from "./keys";
import { isRecord } from "./paths";
import type { SearchIndex } from "./search-index";
import { readCount } from "./search-params";
import { kind } from "./settings-check";

/** Routes that create, list, change, swap and measure indexes. */
export function indexRoutes(engine: Engine): Route[] {
  return [
    {
      method: "GET",
      path: "/indexes",
      action: "indexes.get",
      handle: ({ query, caller }) => {
        const offset = readCount("offset", query.get("offset") ?? "0", "invalid_index_offset");
        const limit = readCount("limit", query.get("limit") ?? "20", "invalid_index_limit");
        const visible = [...engine.indexes.values()].filter((index) => caller.allows("indexes.get", index.uid));
        visible.sort((a, b) => (a.uid < b.uid ? -1 : 1));
        const results = visible.slice(offset, offset + limit).map(describe);
        return ok({ results, offset, limit, total: visible.length });
      },
    },
    {
      method: "POST",
      path: "/indexes",
      action: "indexes.create",
      handle: async (exchange) => {
        const body = readFields(await readJson(exchange), ["uid", "primaryKey"]);
        if (body.uid === undefined) throw new ServiceError("missing_index_uid", "Missing field `uid`");
        const uid = checkUid(body.uid, ".uid");
        if (!exchange.caller.allows("indexes.create", uid)) throw invalidKey();
        return accepted(engine.createIndex(uid, readPrimaryKey(body.primaryKey)));
      },
    },
    {
      method: "GET",
      path: "/indexes/:index",
      action: "indexes.get",
      handle: (exchange) => ok(describe(engine.index(indexUidOf(exchange, "indexes.get")))),
    },
    {
      method: "PATCH",
      path: "/indexes/:index",
      action: "indexes.update",
      handle: async (exchange) => {
        const uid = indexUidOf(exchange, "indexes.update");
        const body = await readJson(exchange);
        for (const field of ["createdAt", "updatedAt"]) {
          if (!isRecord(body) || body[field] === undefined) continue;
          const code = `immutable_index_${field.replace("A", "_a")}`;
          throw new ServiceError(code, `Immutable field \`${field}\`: expected one of \`primaryKey\`, \`uid\``);
        }
        const { primaryKey, uid: newUid } = readFields(body, ["primaryKey", "uid"]);
        const change = { primaryKey: readPrimaryKey(primaryKey) };
        return accepted(
          engine.updateIndex(uid, newUid == null ? change : { ...change, uid: checkUid(newUid, ".uid") }),
        );
      },
    },
    {
      method: "DELETE",
      path: "/indexes/:index",
      action: "indexes.delete",
      handle: (exchange) => accepted(engine.deleteIndex(indexUidOf(exchange, "indexes.delete"))),
    },
    {
      method: "POST",
      path: "/swap-indexes",
      action: "indexes.swap",
      handle: async (exchange) => {
        const swaps = readSwaps(await readJson(exchange));
        for (const uid of swaps.flatMap((swap) => swap.indexes)) {
          if (!exchange.caller.allows("indexes.swap", uid)) throw invalidKey();
        }
        return accepted(engine.swapIndexes(swaps));
      },
    },
    {
      method: "GET",
      path: "/indexes/:index/stats",
      action: "stats.get",
      handle: (exchange) => ok(measure(engine, engine.index(indexUidOf(exchange, "stats.get")))),
    },
    {
      method: "GET",
      path: "/stats",
      action: "stats.get",
      handle: ({ caller }) => {
        const visible = [...engine.indexes.values()].filter((index) => caller.allows("stats.get", index.uid));
        const bytes = visible.reduce((sum, index) => sum + index.documentBytes, 0);
        const updates = visible.map((index) => index.updatedAt).sort();
        return ok({
          databaseSize: bytes,
          usedDatabaseSize: bytes,
          lastUpdate: updates[updates.length - 1] ?? null,
          indexes: Object.fromEntries(visible.map((index) => [index.uid, measure(engine, index)])),
        });
      },
    },
  ];
}

function describe(index: SearchIndex): Record<string, unknown> {
  return { uid: index.uid, createdAt: index.createdAt, updatedAt: index.updatedAt, primaryKey: index.primaryKey };
}

function measure(engine: Engine, index: SearchIndex): Record<string, unknown> {
  return {
    numberOfDocuments: index.count,
    rawDocumentDbSize: index.documentBytes,
    avgDocumentSize: index.count === 0 ? 0 : Math.round(index.documentBytes / index.count),
    isIndexing: engine.tasks.isBusyWith(index.uid),
    numberOfEmbeddings: 0,
    numberOfEmbeddedDocuments: 0,
    fieldDistribution: Object.fromEntries([...index.fieldDistribution].sort(([a], [b]) => (a < b ? -1 : 1))),
  };
}

function readFields(body: unknown, known: readonly string[]): Record<string, unknown> {
  if (!isRecord(body))
    throw new ServiceError("bad_request", `Invalid value type: expected an object, but found ${kind(body)}`);
  const odd = Object.keys(body).find((field) => !known.includes(field));
  if (odd === undefined) return body;
  const list = known.map((each) => `\`${each}\``).join(", ");
  throw new ServiceError("bad_request", `Unknown field \`${odd}\`: expected one of ${list}`);
}

function readPrimaryKey(value: unknown): string | null {
  if (value === undefined || value === null) return null;
  if (typeof value === "string") return value;
  throw new ServiceError(
    "invalid_index_primary_key",
    `Invalid value type at \`.primaryKey\`: expected a string, but found ${kind(value)}`,
  );
}

function readSwaps(body: unknown): Swap[] {
  if (!Array.isArray(body))
    throw new ServiceError("bad_request", `Invalid value type: expected an array, but found ${kind(body)}`);
  const seen = new Set<string>();
  return body.map((item: unknown, i) => {
    const { indexes, rename } = readFields(item, ["indexes", "rename"]);
    if (indexes === undefined)
      throw new ServiceError("missing_swap_indexes", `Missing field \`indexes\` inside \`[${i}]\``);
    if (!Array.isArray(indexes)) {
      throw new ServiceError(
        "invalid_swap_indexes",
        `Invalid value type at \`[${i}].indexes\`: expected an array, but found ${kind(indexes)}`,
      );
    }
    const uids = indexes.map((uid: unknown, j) => checkUid(uid, `[${i}].indexes[${j}]`));
    const [first, second] = uids;
    if (first === undefined || second === undefined || uids.length !== 2) {
      const list = uids.map((uid) => `"${uid}"`).join(", ");
      throw new ServiceError(
        "invalid_swap_indexes",
        `Two indexes must be given for each swap. The list \`[${list}]\` contains ${uids.length} indexes.`,
      );
    }
    for (const uid of uids) {
      if (seen.has(uid)) {
        throw new ServiceError(
          "invalid_swap_duplicate_index_found",
          `Indexes must be declared only once during a swap. \`${uid}\` was specified several times.`,
        );
      }
      seen.add(uid);
    }
    return { indexes: [first, second], rename: rename === true };
  });
}
