import type { IncomingMessage, ServerResponse } from "node:http";
import { ServiceError } from "./errors";
import { parseJson } from "./json";
import type { Caller } from "./keys";
import { invalidKey } from "./keys";

const BODY_BYTES_MAX = 100 * 1024 * 1024;
const UID = /^[A-Za-z0-9_-]{1,400}$/;

/** One request as the handlers see it. */
export type Exchange = {
  params: Readonly<Record<string, string>>;
  query: URLSearchParams;
  caller: Caller;
  header: (name: string) => string | undefined;
  text: () => Promise<string>;
};
export type Answer = { status: number; body?: unknown };
export type Handler = (exchange: Exchange) => Answer | Promise<Answer>;
/** `action` is the permission that a key needs; undefined for what is open to all. */
export type Route = { method: string; path: string; action: string | undefined; handle: Handler };

export const ok = (body: unknown): Answer => ({ status: 200, body });
export const accepted = (body: unknown): Answer => ({ status: 202, body });

/** Path parameters if the path fits the pattern, whose parts `:name` take anything. */
export function matchPath(pattern: string, path: string): Record<string, string> | undefined {
  const wanted = pattern.split("/");
  const given = path.split("/");
  if (wanted.length !== given.length) return undefined;
  const params: Record<string, string> = {};
  for (let i = 0; i < wanted.length; i += 1) {
    const part = wanted[i] as string;
    const text = given[i] as string;
    if (part.startsWith(":")) {
      if (text === "") return undefined;
      try {
        params[part.slice(1)] = decodeURIComponent(text);
      } catch {
        return undefined;
      }
    } else if (part !== text) return undefined;
  }
  return params;
}

/** The index that a request names, after a look at its form and at what the key covers. */
export function indexUidOf(exchange: Exchange, action: string): string {
  const uid = checkUid(exchange.params.index ?? "", "");
  if (!exchange.caller.allows(action, uid)) throw invalidKey();
  return uid;
}

export function checkUid(uid: unknown, at: string): string {
  if (typeof uid === "string" && UID.test(uid)) return uid;
  const place = at === "" ? "" : `Invalid value at \`${at}\`: `;
  throw new ServiceError(
    "invalid_index_uid",
    `${place}\`${String(uid)}\` is not a valid index uid. Index uid can be an integer or a string containing only alphanumeric characters, hyphens (-) and underscores (_), and can not be more than 400 bytes.`,
  );
}

/** Media type of the request; a missing or unknown one is refused with the list of those accepted. */
export function contentTypeOf(exchange: Exchange, acceptable: readonly string[]): string {
  const header = exchange.header("content-type");
  const list = acceptable.map((each) => `\`${each}\``).join(", ");
  const hint = `Accepted values for the Content-Type header are: ${list}`;
  if (header === undefined) throw new ServiceError("missing_content_type", `A Content-Type header is missing. ${hint}`);
  const type = (header.split(";")[0] ?? "").trim().toLowerCase();
  if (!acceptable.includes(type)) {
    throw new ServiceError("invalid_content_type", `The Content-Type \`${type}\` is invalid. ${hint}`);
  }
  return type;
}

/** The request's JSON; an empty body is refused unless `fallback` stands in for it. */
export async function readJson(exchange: Exchange, fallback?: unknown): Promise<unknown> {
  const text = await exchange.text();
  if (text.trim() === "" && fallback !== undefined) return fallback;
  contentTypeOf(exchange, ["application/json"]);
  if (text.trim() === "") throw new ServiceError("missing_payload", "A json payload is missing.");
  try {
    return parseJson(text);
  } catch (error) {
    const said = error instanceof Error ? error.message : String(error);
    throw new ServiceError("malformed_payload", `The json payload provided is malformed. \`${said}\`.`);
  }
}

export async function readBody(request: IncomingMessage): Promise<string> {
  if (request.headers["content-encoding"] !== undefined) {
    throw new ServiceError("invalid_content_type", "Compressed payloads are not supported by this server.");
  }
  const chunks: Buffer[] = [];
  let size = 0;
  for await (const chunk of request as AsyncIterable<Buffer>) {
    size += chunk.length;
    if (size > BODY_BYTES_MAX) {
      throw new ServiceError(
        "payload_too_large",
        "The provided payload reached the size limit. The maximum accepted payload size is 100 MiB.",
      );
    }
    chunks.push(chunk);
  }
  return Buffer.concat(chunks).toString("utf8");
}

export function send(response: ServerResponse, answer: Answer): void {
  if (answer.body === undefined) {
    response.writeHead(answer.status).end();
    return;
  }
  const text = JSON.stringify(answer.body);
  response.writeHead(answer.status, {
    "content-type": "application/json",
    "content-length": Buffer.byteLength(text),
  });
  response.end(text);
}
