/** An answer that differs from "200 with this JSON": another status, or headers. */
export class Reply {
  constructor(
    readonly body: unknown,
    readonly status: number,
    readonly headers: Readonly<Record<string, string>>,
  ) {}
}

/** For handlers: `return reply(created, { status: 201 })`. A body of undefined sends none. */
export function reply(
  body: unknown,
  { status = 200, headers = {} }: { status?: number; headers?: Record<string, string> } = {},
): Reply {
  return new Reply(body, status, headers);
}

/** What a handler gave, as a status and a body: undefined is 204. */
export function asReply(value: unknown): Reply {
  return value instanceof Reply ? value : new Reply(value, value === undefined ? 204 : 200, {});
}

/** A JSON response. Answers are private to who asked unless the handler says otherwise. */
export function toResponse({ body, status, headers }: Reply, requestId: string): Response {
  const empty = body === undefined;
  return new Response(empty ? null : JSON.stringify(body), {
    status: empty && status === 200 ? 204 : status,
    headers: {
      "cache-control": "private, no-store",
      ...(!empty && { "content-type": "application/json; charset=utf-8" }),
      ...headers,
      "x-request-id": requestId,
    },
  });
}
