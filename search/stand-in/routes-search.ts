import { randomUUID } from "node:crypto";
import type { Engine } from "./engine";
import { ServiceError, notSupported } from "./errors";
import type { FederatedQuery, Federation } from "./federation";
import { checkFederated, federate, readFederation, readWeight } from "./federation";
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

const QUERIES_MAX = 1000;

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
        const { queries, federation } = readMultiSearch(await readJson(exchange));
        if (queries.length > QUERIES_MAX) throw notSupported(`A multi-search of more than ${QUERIES_MAX} queries`);
        const shared = options(new Map());
        const read = queries.map((query, i) => inside(i, () => readQuery(engine, exchange, query, i, federation)));
        if (federation !== undefined) return ok(federate(read, federation, shared));
        const results = read.map(({ index, params }, i) => ({
          indexUid: index.uid,
          ...inside(i, () => search(index, params, shared)),
        }));
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

function readMultiSearch(body: unknown): { queries: unknown[]; federation: Federation | undefined } {
  if (!isRecord(body))
    throw new ServiceError("bad_request", `Invalid value type: expected an object, but found ${kind(body)}`);
  const odd = Object.keys(body).find((field) => field !== "queries" && field !== "federation");
  if (odd !== undefined) {
    throw new ServiceError("bad_request", `Unknown field \`${odd}\`: expected one of \`queries\`, \`federation\``);
  }
  if (body.queries === undefined) throw new ServiceError("bad_request", "Missing field `queries`");
  const wrong = (at: string, expected: string, found: unknown): ServiceError =>
    new ServiceError("bad_request", `Invalid value type at \`${at}\`: expected ${expected}, but found ${kind(found)}`);
  const { queries, federation } = body;
  if (!Array.isArray(queries)) throw wrong(".queries", "an array", queries);
  if (federation === undefined || federation === null) return { queries, federation: undefined };
  if (!isRecord(federation)) throw wrong(".federation", "an object", federation);
  return { queries, federation: readFederation(federation) };
}

/** A refusal of one query refuses the request and says which query it was. */
function inside<T>(position: number, run: () => T): T {
  try {
    return run();
  } catch (error) {
    throw error instanceof ServiceError ? error.prefixed(`Inside \`.queries[${position}]\`: `) : error;
  }
}

function readQuery(
  engine: Engine,
  exchange: Exchange,
  query: unknown,
  position: number,
  federation: Federation | undefined,
): FederatedQuery {
  if (!isRecord(query))
    throw new ServiceError("bad_request", `Invalid value type: expected an object, but found ${kind(query)}`);
  const { indexUid, federationOptions, ...body } = query;
  if (indexUid === undefined) throw new ServiceError("missing_index_uid", "Missing field `indexUid`");
  if (federation === undefined && federationOptions !== undefined && federationOptions !== null) {
    throw new ServiceError(
      "invalid_multi_search_federation_options",
      `Using \`federationOptions\` is not allowed in a non-federated search.\n - Hint: remove \`federationOptions\` from query #${position} or add \`federation\` to the request.`,
    );
  }
  const uid = checkUid(indexUid, ".indexUid");
  if (!exchange.caller.allows("search", uid)) throw invalidKey();
  const params = tied(readSearch(body), exchange.caller, uid);
  const read = { index: engine.index(uid), params, weight: readWeight(federationOptions) };
  if (federation !== undefined) checkFederated(read, body, position);
  return read;
}
