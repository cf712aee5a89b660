import { encode } from "next-auth/jwt";
import { beforeAll, describe, expect, it } from "vitest";
import { z } from "zod";
import { appDb } from "@/db/client/handles";
import { idParams, problemSchema } from "@/lib/contracts/base";
import { ExpectedError } from "@/lib/domain/expected-error";
import { adoptEnvironment } from "@/lib/env/env";
import { peerHeader } from "@/lib/http/peer";
import { reply } from "@/lib/http/reply";
import { route } from "@/lib/http/route";
import { makePerson } from "../factories/people";
import { setUpDatabase } from "../setup/database";

const db = setUpDatabase();
const secret = "a secret of thirty-two characters or more";
const origin = "http://127.0.0.1:3000";
let cookie = "";

beforeAll(async () => {
  adoptEnvironment({ NEXTAUTH_SECRET: secret, NEXTAUTH_URL: origin, LOG_LEVEL: "silent" });
  const { personId } = await makePerson(db.owner, "osier");
  cookie = `fanfold-session=${await encode({ token: { personId, sessionVersion: 1 }, secret })}`;
});

type Handler = (request: Request, next: { params: Promise<Record<string, string>> }) => Promise<Response>;

async function ask(handler: Handler, init: RequestInit & { path?: string; params?: Record<string, string> } = {}) {
  const { path = "/api/v1/x", params = {}, ...rest } = init;
  const response = await handler(new Request(`${origin}${path}`, rest), { params: Promise.resolve(params) });
  const text = await response.text();
  return { response, status: response.status, body: text === "" ? undefined : (JSON.parse(text) as unknown) };
}

const json = (body: string, more: Record<string, string> = {}): RequestInit => ({
  method: "POST",
  body,
  headers: { "content-type": "application/json", ...more },
});
const runs = z.strictObject({ runs: z.array(z.strictObject({ levelDba: z.number({ error: "is no number" }) })) });
const echo = route({ access: "public", body: runs }, async ({ body }) => body);

describe("a refusal", () => {
  it("is a problem body of RFC 9457 with code, fields and the request's id", async () => {
    const { response, status, body } = await ask(echo, json('{"runs":[{"levelDba":40},{"levelDba":"loud","rpm":1}]}'));
    // RFC 9457, clause 3: media type application/problem+json; members type, title, status and detail.
    expect(response.headers.get("content-type")).toBe("application/problem+json");
    const problem = problemSchema.parse(body);
    expect(problem).toMatchObject({ status, code: "malformed", requestId: response.headers.get("x-request-id") });
    expect(problem.fields).toEqual([
      { path: "runs[1].levelDba", message: "is no number" },
      { path: "runs[1].rpm", message: "is not known here" },
    ]);
  });

  it("has the status that its cause calls for", async () => {
    const byId = route({ access: "public", params: idParams, query: z.strictObject({}) }, async () => ({}));
    const mine = route({ access: "signed_in" }, async ({ actor }) => ({ handle: actor.handle }));
    expect(await ask(echo, json("{"))).toMatchObject({ status: 400 });
    expect(await ask(echo, { method: "POST", body: "a=1", headers: { "content-type": "text/plain" } })).toMatchObject({
      status: 415,
    });
    expect(await ask(echo, json(JSON.stringify({ runs: "x".repeat(300_000) })))).toMatchObject({ status: 413 });
    expect(await ask(byId, { params: { id: "no-uuid" } })).toMatchObject({ status: 404 });
    expect(await ask(byId, { params: { id: crypto.randomUUID() }, path: "/api/v1/x?sort=a" })).toMatchObject({
      status: 400,
    });
    expect(await ask(mine)).toMatchObject({ status: 401 });
    expect(await ask(mine, { headers: { cookie } })).toMatchObject({ status: 200, body: { handle: "osier" } });
    expect(await ask(echo, json('{"runs":[]}', { cookie, origin: "https://evil.example" }))).toMatchObject({
      status: 403,
    });
    expect(await ask(echo, json('{"runs":[]}', { cookie, origin }))).toMatchObject({ status: 200, body: { runs: [] } });
  });

  it("counts a body while it comes, whatever length it claims", async () => {
    const body = new ReadableStream({
      pull: (controller) => controller.enqueue(new Uint8Array(64 * 1024).fill(32)),
    });
    const init = {
      method: "POST",
      body,
      duplex: "half",
      headers: { "content-type": "application/json" },
    } as RequestInit;
    expect(await ask(echo, init)).toMatchObject({ status: 413 });
  });

  it("tells nothing of an unforeseen error but the number to ask about", async () => {
    const broken = route({ access: "public" }, async () => {
      throw new Error("password of the database: hunter2");
    });
    const { status, body } = await ask(broken);
    expect(status).toBe(500);
    expect(JSON.stringify(body)).not.toContain("hunter2");
    const missing = route({ access: "public" }, () => appDb()("knex_migrations_lock").select().then());
    expect((await ask(missing)).status).toBe(500);
  });
});

describe("what the database refuses", () => {
  const attempt = (work: () => Promise<unknown>) => ask(route({ access: "public" }, work));

  it("becomes a conflict, a bad value or a state that moved on, without quoting rows", async () => {
    const person = { handle: "osier", email: "other@people.example" };
    const twice = await attempt(() => appDb()("person").insert(person).then());
    expect(twice).toMatchObject({ status: 409, body: { code: "already_there" } });
    expect(JSON.stringify(twice.body)).not.toContain("osier");
    const bad = await attempt(() =>
      appDb()("person")
        .insert({ ...person, handle: "Not A Handle" })
        .then(),
    );
    expect(bad).toMatchObject({ status: 400, body: { code: "malformed" } });
    const busy = await attempt(() =>
      appDb().raw("do $$ begin raise exception 'moved' using errcode = '40001'; end $$").then(),
    );
    expect(busy).toMatchObject({ status: 409, body: { code: "moved_on", detail: "Moved." } });
  });

  it("is our fault when the application's role lacks a right, and the person's when a trigger says so", async () => {
    expect(await attempt(() => appDb()("audit").update({ action: "x" }).then())).toMatchObject({ status: 500 });
    const raised = "do $$ begin raise exception 'owners sign nothing' using errcode = 'insufficient_privilege'; end $$";
    expect(await attempt(() => appDb().raw(raised).then())).toMatchObject({
      status: 403,
      body: { code: "forbidden", detail: "Owners sign nothing." },
    });
  });
});

describe("a second press", () => {
  it("of the same key gets the first answer and does nothing; another body under it is refused", async () => {
    let done = 0;
    const add = route({ access: "signed_in", body: z.strictObject({ n: z.int() }) }, async ({ body }) =>
      reply({ ...body, done: (done += 1) }, { status: 201 }),
    );
    const press = (n: number, key = "key-of-the-form") =>
      ask(add, json(JSON.stringify({ n }), { cookie, origin, "idempotency-key": key }));
    expect(await press(1)).toMatchObject({ status: 201, body: { n: 1, done: 1 } });
    expect(await press(1)).toMatchObject({ status: 201, body: { n: 1, done: 1 } });
    expect(await press(2)).toMatchObject({ status: 409 });
    const many = await Promise.all(Array.from({ length: 8 }, () => press(3, "another-key")));
    expect(many.filter((each) => each.status !== 201 && each.status !== 409)).toEqual([]);
    expect(done).toBe(2);
  });

  it("after a refusal is a new try", async () => {
    let tries = 0;
    const flaky = route({ access: "signed_in" }, async () => {
      tries += 1;
      if (tries === 1) throw new ExpectedError("moved_on", "Not now.");
      return { tries };
    });
    const press = () => ask(flaky, json("{}", { cookie, origin, "idempotency-key": "flaky-key" }));
    expect(await press()).toMatchObject({ status: 409 });
    expect(await press()).toMatchObject({ status: 200, body: { tries: 2 } });
  });
});

describe("a limit", () => {
  it("holds for an address over all processes and says when to come again", async () => {
    const limits = [{ name: "three", max: 3, windowS: 3600 }];
    const limited = route({ access: "public", limits }, async () => ({}));
    const from = (peer: string) => ask(limited, { headers: { [peerHeader]: peer } });
    for (let n = 0; n < 3; n += 1) expect((await from("198.51.100.7")).status).toBe(200);
    const refused = await from("198.51.100.7");
    // RFC 6585, clause 4, and RFC 9110, 10.2.3: 429 with Retry-After in seconds.
    expect(refused.status).toBe(429);
    expect(Number(refused.response.headers.get("retry-after"))).toBeGreaterThan(0);
    expect((await from("198.51.100.8")).status).toBe(200);
  });
});

describe("an answer", () => {
  it("is kept by no cache, and nothing at all is 204", async () => {
    const { response, status } = await ask(route({ access: "public" }, async () => undefined));
    expect([status, response.headers.get("cache-control")]).toEqual([204, "private, no-store"]);
  });
});
