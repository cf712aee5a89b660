import type { IncomingMessage, ServerResponse } from "node:http";
import { createServer } from "node:http";
import { Engine } from "./engine";
import { ServiceError } from "./errors";
import type { Exchange, Route } from "./http";
import { matchPath, readBody, send } from "./http";
import { invalidKey } from "./keys";
import { documentRoutes } from "./routes-documents";
import { indexRoutes } from "./routes-indexes";
import { searchRoutes } from "./routes-search";
import { refusedRoutes, serverRoutes } from "./routes-server";
import { settingsRoutes } from "./routes-settings";
import { warmUp } from "./warm-up";

const LOOPBACK = "127.0.0.1";
/** A connection that was quiet for a while is still good for the next request. */
const KEEP_ALIVE_MS = 120_000;

export type StandInOptions = {
  /** Port on 127.0.0.1; 0 takes a free one. */
  port: number;
  /** Key that may do everything; must not be empty. */
  masterKey: string;
  /** Allows NODE_ENV=production, for the demonstration on loopback only. */
  allowProduction?: boolean;
};
export type StandIn = { url: string; close: () => Promise<void> };

/**
 * Starts the search service's stand-in: in memory, on 127.0.0.1 only. It keeps nothing when it ends; whoever
 * fills it must fill it again.
 */
export async function startSearchStandIn(options: StandInOptions): Promise<StandIn> {
  if (process.env.NODE_ENV === "production" && options.allowProduction !== true) {
    throw new Error("The search stand-in is for development and tests: set MEILI_HOST to a search service instead.");
  }
  if (options.masterKey === "") throw new Error("The search stand-in needs a master key.");
  warmUp();
  const engine = new Engine(options.masterKey);
  const routes = [
    ...serverRoutes(engine),
    ...indexRoutes(engine),
    ...documentRoutes(engine),
    ...settingsRoutes(engine),
    ...searchRoutes(engine),
    ...refusedRoutes(),
  ];
  const server = createServer((request, response) => {
    void respond(engine, routes, request, response);
  });
  server.keepAliveTimeout = KEEP_ALIVE_MS;
  await new Promise<void>((resolve, reject) => {
    server.once("error", reject);
    server.listen(options.port, LOOPBACK, resolve);
  });
  const address = server.address();
  const port = typeof address === "object" && address !== null ? address.port : options.port;
  return {
    url: `http://${LOOPBACK}:${port}`,
    close: () =>
      new Promise((resolve, reject) => {
        engine.tasks.close();
        server.close((error) => (error === undefined ? resolve() : reject(error)));
        server.closeAllConnections();
      }),
  };
}

async function respond(
  engine: Engine,
  routes: readonly Route[],
  request: IncomingMessage,
  response: ServerResponse,
): Promise<void> {
  try {
    const url = addressOf(request.url ?? "/");
    const path = url.pathname.length > 1 ? url.pathname.replace(/\/$/, "") : url.pathname;
    const found = findRoute(routes, request.method ?? "GET", path);
    if (typeof found === "number") {
      request.resume();
      send(response, { status: found });
      return;
    }
    const { route, params } = found;
    const caller =
      route.action === undefined
        ? { allows: () => true }
        : engine.keys.identify(request.headers.authorization, Date.now());
    if (route.action !== undefined && !caller.allows(route.action)) throw invalidKey();
    const exchange: Exchange = {
      params,
      query: url.searchParams,
      caller,
      header: (name) => {
        const value = request.headers[name];
        return Array.isArray(value) ? value[0] : value;
      },
      text: () => readBody(request),
    };
    send(response, await route.handle(exchange));
  } catch (error) {
    request.resume();
    const refusal =
      error instanceof ServiceError
        ? error
        : new ServiceError("internal", `An internal error has occurred. \`${String(error)}\`.`);
    if (!response.headersSent) send(response, { status: refusal.status, body: refusal.toBody() });
  }
}

/** The request's address; one that is none leads to no route. */
function addressOf(target: string): URL {
  const base = `http://${LOOPBACK}`;
  return new URL(URL.canParse(target, base) ? target : "/unreadable", base);
}

/** The route, or the status of what isn't one: 404 for an unknown path, 405 for an unknown method on a known one. */
function findRoute(
  routes: readonly Route[],
  method: string,
  path: string,
): { route: Route; params: Record<string, string> } | 404 | 405 {
  let isKnown = false;
  for (const route of routes) {
    const params = matchPath(route.path, path);
    if (params === undefined) continue;
    if (route.method === method) return { route, params };
    isKnown = true;
  }
  return isKnown ? 405 : 404;
}
