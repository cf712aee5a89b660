import type { Engine } from "./engine";
import { ServiceError } from "./errors";
import { parseFilter } from "./filter-parse";
import { runFilter } from "./filter-run";
import type { Exchange, Route } from "./http";
import { accepted, contentTypeOf, indexUidOf, ok, readJson } from "./http";
import type { Document } from "./paths";
import { isRecord, project } from "./paths";
import { rank, readSort } from "./rank";
import { readDelimiter } from "./read-csv";
import type { SearchIndex } from "./search-index";
import { readCount, readFlag } from "./search-params";
import { readDocuments, readIds } from "./write-documents";

type ListQuery = {
  offset: number;
  limit: number;
  fields: string[];
  ids: string[] | undefined;
  filter: unknown;
  sort: string[];
  vectors: boolean;
};

const LIST_FIELDS = ["offset", "limit", "fields", "retrieveVectors", "filter", "ids", "sort"];

/** Routes that read and write documents. */
export function documentRoutes(engine: Engine): Route[] {
  const base = "/indexes/:index/documents";
  const write = (mode: "replace" | "merge") => async (exchange: Exchange) => {
    const uid = indexUidOf(exchange, "documents.add");
    const odd = [...exchange.query.keys()].find((name) => name !== "primaryKey" && name !== "csvDelimiter");
    if (odd !== undefined) {
      const list = "expected one of `primaryKey`, `csvDelimiter`";
      throw new ServiceError("bad_request", `Unknown parameter \`${odd}\`: ${list}`);
    }
    const type = contentTypeOf(exchange, ["application/json", "application/x-ndjson", "text/csv"]);
    const delimiter = exchange.query.get("csvDelimiter");
    if (delimiter !== null && type !== "text/csv") {
      throw new ServiceError(
        "invalid_content_type",
        `The Content-Type \`${type}\` does not support the use of a csv delimiter. The csv delimiter can only be used with the Content-Type \`text/csv\`.`,
      );
    }
    const documents = readDocuments(await exchange.text(), type, readDelimiter(delimiter));
    return accepted(engine.addDocuments(uid, documents, mode, exchange.query.get("primaryKey")));
  };
  return [
    { method: "POST", path: base, action: "documents.add", handle: write("replace") },
    { method: "PUT", path: base, action: "documents.add", handle: write("merge") },
    {
      method: "GET",
      path: base,
      action: "documents.get",
      handle: (exchange) => {
        const index = engine.index(indexUidOf(exchange, "documents.get"));
        return ok(list(engine, index, readAddress(exchange.query)));
      },
    },
    {
      method: "POST",
      path: `${base}/fetch`,
      action: "documents.get",
      handle: async (exchange) => {
        const index = engine.index(indexUidOf(exchange, "documents.get"));
        return ok(list(engine, index, readFetch(await readJson(exchange, {}))));
      },
    },
    {
      method: "POST",
      path: `${base}/delete-batch`,
      action: "documents.delete",
      handle: async (exchange) => {
        const uid = indexUidOf(exchange, "documents.delete");
        return accepted(engine.deleteDocuments(uid, readIds(await readJson(exchange))));
      },
    },
    {
      method: "POST",
      path: `${base}/delete`,
      action: "documents.delete",
      handle: async (exchange) => {
        const uid = indexUidOf(exchange, "documents.delete");
        const body = await readJson(exchange);
        if (!isRecord(body) || body.filter === undefined) {
          throw new ServiceError("missing_document_filter", "Missing field `filter`");
        }
        if (parseFilter(body.filter, "invalid_document_filter") === undefined) {
          throw new ServiceError("invalid_document_filter", "Sending an empty filter is forbidden.");
        }
        return accepted(engine.deleteByFilter(uid, body.filter));
      },
    },
    {
      method: "DELETE",
      path: base,
      action: "documents.delete",
      handle: (exchange) => accepted(engine.deleteDocuments(indexUidOf(exchange, "documents.delete"), "all")),
    },
    {
      method: "GET",
      path: `${base}/:id`,
      action: "documents.get",
      handle: (exchange) => {
        const index = engine.index(indexUidOf(exchange, "documents.get"));
        const id = exchange.params.id ?? "";
        const slot = index.slotOf(id);
        const document = slot === undefined ? undefined : index.documents[slot];
        if (document === undefined) throw new ServiceError("document_not_found", `Document \`${id}\` not found.`);
        return ok(shape(document, readAddress(exchange.query)));
      },
    },
    {
      method: "DELETE",
      path: `${base}/:id`,
      action: "documents.delete",
      handle: (exchange) => {
        const uid = indexUidOf(exchange, "documents.delete");
        return accepted(engine.deleteDocuments(uid, readIds([exchange.params.id])));
      },
    },
  ];
}

function list(engine: Engine, index: SearchIndex, query: ListQuery): Record<string, unknown> {
  const code = "invalid_document_filter";
  const filter = parseFilter(query.filter, code);
  const mask = filter === undefined ? undefined : runFilter(filter, index.filterContext(code, engine.containsFilter));
  const wanted = query.ids === undefined ? undefined : new Set(query.ids.map((id) => index.slotOf(id)));
  let slots = index
    .liveSlots()
    .filter((slot) => (mask === undefined || mask[slot] === 1) && wanted?.has(slot) !== false);
  if (query.sort.length > 0) {
    slots = Array.from(rank(Int32Array.from(slots), index, undefined, readSort(query.sort, index), slots.length));
  }
  const page = slots.slice(query.offset, query.offset + query.limit);
  const results = page.map((slot) => shape(index.documents[slot] ?? {}, query));
  return { results, offset: query.offset, limit: query.limit, total: slots.length };
}

function shape(document: Document, query: Pick<ListQuery, "fields" | "vectors">): Document {
  const kept = project(document, query.fields);
  return query.vectors ? { ...kept, _vectors: {} } : kept;
}

function readAddress(query: URLSearchParams): ListQuery {
  const odd = [...query.keys()].find((name) => !LIST_FIELDS.includes(name));
  if (odd !== undefined) {
    const names = LIST_FIELDS.map((each) => `\`${each}\``).join(", ");
    throw new ServiceError("bad_request", `Unknown parameter \`${odd}\`: expected one of ${names}`);
  }
  const split = (name: string): string[] | undefined =>
    query
      .get(name)
      ?.split(",")
      .filter((part) => part !== "");
  return {
    offset: readCount("offset", query.get("offset") ?? "0", "invalid_document_offset"),
    limit: readCount("limit", query.get("limit") ?? "20", "invalid_document_limit"),
    fields: split("fields") ?? ["*"],
    ids: split("ids"),
    filter: query.get("filter"),
    sort: split("sort") ?? [],
    vectors: readFlag("retrieveVectors", query.get("retrieveVectors") ?? "false", "invalid_document_retrieve_vectors"),
  };
}

function readFetch(body: unknown): ListQuery {
  if (!isRecord(body)) throw new ServiceError("bad_request", "Invalid value type: expected an object");
  const odd = Object.keys(body).find((name) => !LIST_FIELDS.includes(name));
  if (odd !== undefined) {
    const names = LIST_FIELDS.map((each) => `\`${each}\``).join(", ");
    throw new ServiceError("bad_request", `Unknown field \`${odd}\`: expected one of ${names}`);
  }
  const count = (name: "offset" | "limit", fallback: number): number => {
    const value = body[name] ?? fallback;
    return readCount(name, String(value), `invalid_document_${name}`);
  };
  const names = (value: unknown): string[] | undefined => {
    if (typeof value === "string") return value.split(",");
    return Array.isArray(value) ? value.map(String) : undefined;
  };
  return {
    offset: count("offset", 0),
    limit: count("limit", 20),
    fields: names(body.fields) ?? ["*"],
    ids: names(body.ids),
    filter: body.filter,
    sort: names(body.sort) ?? [],
    vectors: body.retrieveVectors === true,
  };
}
