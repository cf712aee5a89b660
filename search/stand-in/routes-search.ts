import { randomUUID } from "node:crypto";
import type { Engine } from "./engine";
import { ServiceError, notSupported } from "./errors";
import type { Exchange, Route } from "./http";
import { checkUid, indexUidOf, ok, readJson } from "./http";
import type { Caller } from "./keys";
import { invalidKey } from "./keys";
import { isRecord } from "./paths";
import type { SearchOptions, TextCache } from "./search";
import { facetSearch, search } from "./search";
import type { SearchParams } from "./search-params";
import { readFacetSearch, readSearch, readSearchAddress } from "./search-params";
import { kind } from "./settings-check";
import { bothFilters } from "./tenant-token";

/** Routes that search. */
export function searchRoutes(engine: Engine): Route[] {
  const options = (texts: TextCache = new Map()): SearchOptions => ({
    allowContains: engine.containsFilter,
    texts,
    now: () => performance.now(),
    requestUid: randomUUID(),
  });
  return [
    {
      method: "POST",
      path: "/indexes/:index/search",
      action: "search",
      handle: async (exchange) => {
        const uid = indexUidOf(exchange, "search");
        const params = tied(readSearch(await readJson(exchange, {})), exchange.caller, uid);
        return ok(search(engine.index(uid), params, options()));
      },
    },
    {
      method: "GET",
      path: "/indexes/:index/search",
      action: "search",
      handle: (exchange) => {
        const uid = indexUidOf(exchange, "search");
        const params = tied(readSearch(readSearchAddress(exchange.query)), exchange.caller, uid);
        return ok(search(engine.index(uid), params, options()));
      },
    },
    {
      method: "POST",
      path: "/indexes/:index/facet-search",
      action: "search",
      handle: async (exchange) => {
        const uid = indexUidOf(exchange, "search");
        const params = tied(readFacetSearch(await readJson(exchange)), exchange.caller, uid);
        return ok(facetSearch(engine.index(uid), params, options()));
      },
    },
    {
      method: "POST",
      path: "/multi-search",
      action: "search",
      handle: async (exchange) => {
        const queries = readQueries(await readJson(exchange));
        const texts: TextCache = new Map();
        const results = queries.map((query, i) => inside(i, () => runQuery(engine, exchange, query, options(texts))));
        return ok({ results });
      },
    },
  ];
}

/** The same search, held to the filter that the caller's token prescribes for this index. */
function tied<T extends SearchParams>(params: T, caller: Caller, uid: string): T {
  const rule = caller.filterFor?.(uid) ?? null;
  return rule === null ? params : { ...params, filter: bothFilters(params.filter, rule) };
}

function readQueries(body: unknown): unknown[] {
  if (!isRecord(body))
    throw new ServiceError("bad_request", `Invalid value type: expected an object, but found ${kind(body)}`);
  const odd = Object.keys(body).find((field) => field !== "queries" && field !== "federation");
  if (odd !== undefined) {
    throw new ServiceError("bad_request", `Unknown field \`${odd}\`: expected one of \`queries\`, \`federation\``);
  }
  if (body.federation !== undefined && body.federation !== null) throw notSupported("Federated search (`federation`)");
  if (body.queries === undefined) throw new ServiceError("bad_request", "Missing field `queries`");
  if (!Array.isArray(body.queries)) {
    throw new ServiceError(
      "bad_request",
      `Invalid value type at \`.queries\`: expected an array, but found ${kind(body.queries)}`,
    );
  }
  return body.queries as unknown[];
}

/** A refusal of one query refuses the request and says which query it was. */
function inside<T>(position: number, run: () => T): T {
  try {
    return run();
  } catch (error) {
    throw error instanceof ServiceError ? error.prefixed(`Inside \`.queries[${position}]\`: `) : error;
  }
}

function runQuery(engine: Engine, exchange: Exchange, query: unknown, options: SearchOptions): Record<string, unknown> {
  if (!isRecord(query))
    throw new ServiceError("bad_request", `Invalid value type: expected an object, but found ${kind(query)}`);
  const { indexUid, federationOptions, ...body } = query;
  if (indexUid === undefined) throw new ServiceError("missing_index_uid", "Missing field `indexUid`");
  if (federationOptions !== undefined && federationOptions !== null)
    throw notSupported("Federated search (`federationOptions`)");
  const uid = checkUid(indexUid, ".indexUid");
  if (!exchange.caller.allows("search", uid)) throw invalidKey();
  return { indexUid: uid, ...search(engine.index(uid), tied(readSearch(body), exchange.caller, uid), options) };
}
