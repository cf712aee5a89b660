import { Readable } from "node:stream";
import { filePolicy } from "./security-headers";

export interface ServedFile {
  name: string;
  bytes: number;
  sha256: string;
  /** By content, never by what was claimed. */
  type: string;
}

/**
 * One part of a file as HTTP's Range asks for (RFC 9110, 14.1.2): undefined for the whole, "outside" where the part lies
 * beyond the end. Several parts at once, other units and what can't be read are answered with the whole, as the RFC allows.
 */
export function partOf(header: string | null, bytes: number): { first: number; last: number } | "outside" | undefined {
  const [, from = "", to = ""] = /^bytes=(\d{0,15})-(\d{0,15})$/.exec(header ?? "") ?? [];
  if (from === "" && to === "") return undefined;
  if (from === "") {
    const last = Number(to);
    return last === 0 ? "outside" : { first: Math.max(0, bytes - last), last: bytes - 1 };
  }
  const [first, last] = [Number(from), to === "" ? bytes - 1 : Math.min(Number(to), bytes - 1)];
  if (first >= bytes) return "outside";
  return last < first ? undefined : { first, last };
}

/** A file name for Content-Disposition, plain and in UTF-8 (RFC 6266, 4.3 and appendix D; RFC 8187). */
export function dispositionOf(name: string): string {
  const plain = name.replace(/[^\x20-\x7e]|["\\%/]/g, "_");
  const coded = encodeURIComponent(name).replace(
    /['()*]/g,
    (sign) => `%${sign.charCodeAt(0).toString(16).toUpperCase()}`,
  );
  return `attachment; filename="${plain}"; filename*=UTF-8''${coded}`;
}

/** Answers with a file or the part asked for. @param open opens the bytes, whole or the part */
export async function fileAnswer(
  request: Request,
  file: ServedFile,
  open: (part: { first: number; last: number } | undefined) => Promise<Readable>,
): Promise<Response> {
  const etag = `"${file.sha256}"`;
  const always = {
    etag,
    "accept-ranges": "bytes",
    "cache-control": "private, no-cache",
    "content-disposition": dispositionOf(file.name),
    "content-security-policy": filePolicy,
    "x-content-type-options": "nosniff",
    "cross-origin-resource-policy": "same-origin",
  };
  const known = request.headers
    .get("if-none-match")
    ?.split(",")
    .map((each) => each.trim().replace(/^W\//, ""));
  if (known?.includes(etag) || known?.includes("*")) return new Response(null, { status: 304, headers: always });
  const whole = request.headers.get("if-range");
  const part = whole === null || whole === etag ? partOf(request.headers.get("range"), file.bytes) : undefined;
  if (part === "outside") {
    return new Response(null, { status: 416, headers: { ...always, "content-range": `bytes */${file.bytes}` } });
  }
  const length = part ? part.last - part.first + 1 : file.bytes;
  const body = request.method === "HEAD" ? null : (Readable.toWeb(await open(part)) as ReadableStream<Uint8Array>);
  return new Response(body, {
    status: part ? 206 : 200,
    headers: {
      ...always,
      "content-type": file.type,
      "content-length": String(length),
      ...(part && { "content-range": `bytes ${part.first}-${part.last}/${file.bytes}` }),
    },
  });
}

/** A small file made for this answer, as a download that nothing runs in. */
export function download(name: string, type: string, body: string | Uint8Array<ArrayBuffer>): Response {
  return new Response(body, {
    headers: {
      "content-type": type,
      "content-disposition": dispositionOf(name),
      "content-security-policy": filePolicy,
      "cache-control": "private, no-store",
      "x-content-type-options": "nosniff",
    },
  });
}
