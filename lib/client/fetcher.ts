import type { z } from "zod";
import { problemSchema, type Problem } from "@/lib/contracts/base";

/** A refusal by the API, or none reached: `code` is "offline" then. */
export class ApiError extends Error {
  override readonly name = "ApiError";
  constructor(
    readonly code: Problem["code"] | "offline",
    readonly detail: string,
    readonly fields: Problem["fields"] = [],
    readonly requestId: string | undefined = undefined,
    /** HTTP status; 0 when there was no answer. */
    readonly status = 0,
  ) {
    super(detail);
  }

  /** What is wrong with one field, as `runs[2].levelDba`; undefined when nothing is. */
  field(path: string): string | undefined {
    return this.fields.find((each) => each.path === path)?.message;
  }
}

export interface SendOptions {
  method?: "GET" | "POST" | "PUT" | "PATCH" | "DELETE";
  body?: unknown;
  /** Sent as it is instead of a JSON body. */
  file?: { content: Blob; type: string };
  signal?: AbortSignal;
  /** A second press with the same key gets the first one's answer and does nothing. */
  onceKey?: string;
}

/** Asks the API and gives the answer's JSON as it is; undefined where it has none. @throws ApiError */
export async function sendRaw(
  path: string,
  { method = "GET", body, file, signal, onceKey }: SendOptions,
): Promise<unknown> {
  const response = await fetch(path, {
    method,
    credentials: "same-origin",
    headers: {
      accept: "application/json",
      ...(body !== undefined && { "content-type": "application/json" }),
      ...(file && { "content-type": file.type }),
      ...(onceKey !== undefined && { "idempotency-key": onceKey }),
    },
    ...(body !== undefined && { body: JSON.stringify(body) }),
    ...(file && { body: file.content }),
    ...(signal && { signal }),
  }).catch((error: unknown) => {
    if (signal?.aborted) throw error;
    throw new ApiError("offline", "There is no connection. What you typed is kept; try again in a moment.");
  });
  if (!response.ok) throw await refusal(response);
  const text = await response.text();
  return text === "" ? undefined : (JSON.parse(text) as unknown);
}

/** Reads from the API, checked against the resource's contract. @throws ApiError */
export async function getJson<T>(schema: z.ZodType<T>, path: string, signal?: AbortSignal): Promise<T> {
  return schema.parse(await sendRaw(path, signal ? { signal } : {}));
}

/** Writes to the API and reads the answer by its contract. @throws ApiError */
export async function sendJson<T>(schema: z.ZodType<T>, path: string, options: SendOptions): Promise<T> {
  return schema.parse(await sendRaw(path, options));
}

/** Writes to the API where the answer says nothing that is needed. @throws ApiError */
export async function send(path: string, options: SendOptions): Promise<void> {
  await sendRaw(path, options);
}

/** A path with a query: undefined is left out, a list stands once an item. */
export function withQuery(
  path: string,
  query: Readonly<Record<string, string | number | boolean | readonly (string | number)[] | undefined>>,
): string {
  const params = new URLSearchParams();
  for (const [name, value] of Object.entries(query)) {
    if (value === undefined) continue;
    for (const each of Array.isArray(value) ? value : [value]) params.append(name, String(each));
  }
  const text = params.toString();
  return text === "" ? path : `${path}?${text}`;
}

async function refusal(response: Response): Promise<ApiError> {
  const body: unknown = await response.json().catch(() => undefined);
  const parsed = problemSchema.safeParse(body);
  if (!parsed.success) {
    const detail = `The server answered ${response.status}. Try again in a moment.`;
    return new ApiError("unexpected", detail, [], undefined, response.status);
  }
  const { code, detail, fields, requestId, status } = parsed.data;
  return new ApiError(code, detail, fields, requestId, status);
}
