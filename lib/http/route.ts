import { randomUUID } from "node:crypto";
import type { z } from "zod";
import { actorFromRequest } from "@/lib/auth/actor";
import { isPerson, type Actor, type Person } from "@/lib/domain/accounts/actor";
import { ExpectedError } from "@/lib/domain/expected-error";
import { takeFromLimit, type Limit } from "@/lib/server/throttle/limit";
import { once } from "@/lib/server/throttle/once";
import { clientAddress } from "./address";
import { defaultMaxBytes, readJson } from "./body";
import { answerFailure } from "./failure";
import { checkOrigin } from "./origin";
import { parseParams, parseSent, queryObject } from "./parse";
import { asReply, Reply, toResponse } from "./reply";

type Access = "public" | "signed_in";
type Schema = z.ZodType | undefined;
type Parsed<S extends Schema> = S extends z.ZodType ? z.output<S> : undefined;

export interface RouteSettings<A extends Access, P extends Schema, Q extends Schema, B extends Schema> {
  /** "signed_in" answers 401 to everybody else; what the actor may do is the use-case's to decide. */
  access: A;
  /** Changing parts of the address; what doesn't fit is 404. */
  params?: P;
  query?: Q;
  /** The JSON body. "raw" leaves the body unread, for uploads and the like, which then keep their own limits. */
  body?: B | "raw";
  /** Beside the general limit on writes. Counted by person where somebody is signed in, else by address. */
  limits?: readonly (Limit & { by?: "address" })[];
  maxBytes?: number;
}

export interface RouteContext<A extends Access, P extends Schema, Q extends Schema, B extends Schema> {
  actor: A extends "signed_in" ? Person : Actor;
  params: Parsed<P>;
  query: Parsed<Q>;
  body: Parsed<B>;
  request: Request;
  requestId: string;
  /** Where the request comes from, for limits; never stored beside what a person does. */
  address: string;
}

type NextContext = { params: Promise<Record<string, string | string[] | undefined>> };

const writeLimit: Limit = { name: "write", max: 600, windowS: 60 };
const reading = new Set(["GET", "HEAD"]);

/**
 * Makes a route handler for `app/api/v1`. The handler gives what is sent as JSON (undefined: 204), `reply(…)` for
 * another status, or a Response as it stands; it throws an ExpectedError to refuse.
 */
export function route<
  A extends Access,
  P extends Schema = undefined,
  Q extends Schema = undefined,
  B extends Schema = undefined,
>(settings: RouteSettings<A, P, Q, B>, handle: (context: RouteContext<A, P, Q, B>) => Promise<unknown>) {
  return async (request: Request, next: NextContext): Promise<Response> => {
    const requestId = randomUUID();
    const url = new URL(request.url);
    try {
      checkOrigin(request);
      const address = clientAddress(request.headers);
      const actor = await actorFromRequest(request);
      if (settings.access === "signed_in" && !isPerson(actor)) {
        throw new ExpectedError("not_signed_in", "Sign in first, then try again.");
      }
      await takeLimits(settings.limits ?? [], request.method, actor, address);
      const params = settings.params && parseParams(settings.params, await next.params);
      const query = settings.query && parseSent(settings.query, queryObject(url.searchParams), "query");
      const sent =
        settings.body === "raw" || reading.has(request.method)
          ? undefined
          : await readJson(request, settings.maxBytes ?? defaultMaxBytes);
      const body = settings.body && settings.body !== "raw" ? parseSent(settings.body, sent, "body") : undefined;
      const context = { actor, params, query, body, request, requestId, address } as RouteContext<A, P, Q, B>;
      return await answer(request, actor, `${url.pathname}${url.search}`, sent, requestId, () => handle(context));
    } catch (error) {
      return answerFailure(error, { method: request.method, path: url.pathname, requestId });
    }
  };
}

async function takeLimits(
  limits: readonly (Limit & { by?: "address" })[],
  method: string,
  actor: Actor,
  address: string,
): Promise<void> {
  const all: readonly (Limit & { by?: "address" })[] = reading.has(method) ? limits : [writeLimit, ...limits];
  for (const limit of all) {
    await takeFromLimit(limit, limit.by === "address" || !isPerson(actor) ? address : actor.personId);
  }
}

/** Runs the handler; a POST with an Idempotency-Key does its work once, however often it is pressed. */
async function answer(
  request: Request,
  actor: Actor,
  path: string,
  sent: unknown,
  requestId: string,
  work: () => Promise<unknown>,
): Promise<Response> {
  const key = request.headers.get("idempotency-key");
  if (key === null || request.method !== "POST" || !isPerson(actor)) {
    const value = await work();
    return value instanceof Response ? value : toResponse(asReply(value), requestId);
  }
  if (key.length < 8 || key.length > 200) {
    throw new ExpectedError("malformed", "An Idempotency-Key has 8 to 200 characters.");
  }
  const what = JSON.stringify([request.method, path, sent]);
  const done = await once({ personId: actor.personId, key, what }, async () => {
    const value = await work();
    if (value instanceof Response) throw new Error("A route that answers by itself can't take an Idempotency-Key.");
    const { body, status } = asReply(value);
    return { status, body };
  });
  return toResponse(new Reply(done.body, done.status, {}), requestId);
}
