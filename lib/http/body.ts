import { ExpectedError } from "@/lib/domain/expected-error";

export const defaultMaxBytes = 256 * 1024;

/**
 * Reads a JSON body, counting bytes while they come, so that a false or missing Content-Length gains nothing.
 *
 * @returns the parsed value; undefined when there is no body
 * @throws ExpectedError `wrong_kind` unless it is application/json, `too_large` beyond `maxBytes`, `malformed` if it is no JSON
 */
export async function readJson(request: Request, maxBytes = defaultMaxBytes): Promise<unknown> {
  const bytes = await readBytes(request, maxBytes);
  if (bytes.byteLength === 0) return undefined;
  const kind = request.headers.get("content-type")?.split(";")[0]?.trim().toLowerCase();
  if (kind !== "application/json") {
    throw new ExpectedError("wrong_kind", "Send the body as application/json.");
  }
  try {
    return JSON.parse(new TextDecoder("utf-8", { fatal: true }).decode(bytes)) as unknown;
  } catch {
    throw new ExpectedError("malformed", "The body is no valid JSON in UTF-8.");
  }
}

/** Reads a body of any kind up to a size; empty when there is none. */
export async function readBytes(request: Request, maxBytes: number): Promise<Uint8Array<ArrayBuffer>> {
  const tooLarge = () =>
    new ExpectedError("too_large", `The body is larger than ${Math.floor(maxBytes / 1024)} KiB. Send less at once.`);
  if (Number(request.headers.get("content-length") ?? 0) > maxBytes) throw tooLarge();
  if (!request.body) return new Uint8Array();
  const parts: Uint8Array[] = [];
  let length = 0;
  const reader = request.body.getReader();
  for (;;) {
    const { done, value } = await reader.read();
    if (done) break;
    length += value.byteLength;
    if (length > maxBytes) {
      await reader.cancel().catch(() => undefined);
      throw tooLarge();
    }
    parts.push(value);
  }
  const whole = new Uint8Array(length);
  let at = 0;
  for (const part of parts) {
    whole.set(part, at);
    at += part.byteLength;
  }
  return whole;
}
