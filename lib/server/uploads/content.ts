import { createHash } from "node:crypto";
import { Readable } from "node:stream";
import { fileKind, type FileKind } from "@/lib/domain/designs/file-kind";
import { cleanPicture, type PictureKind } from "@/lib/services/pictures/clean";
import { storage } from "@/lib/services/storage/from-env";

/** A file as it is kept: its bytes as often as they are asked for, their number, hash and kind. */
export interface Content {
  open: () => Promise<Readable>;
  bytes: number;
  sha256: string;
  kind: FileKind;
}

/** Reads a body once for its SHA-256 and its kind by content. */
export async function contentOf(open: () => Promise<Readable>, bytes: number): Promise<Content> {
  const hash = createHash("sha256");
  let head = new Uint8Array(0);
  for await (const piece of (await open()) as AsyncIterable<Uint8Array>) {
    hash.update(piece);
    if (head.length < 1_024) head = Uint8Array.from([...head, ...piece.subarray(0, 1_024 - head.length)]);
  }
  return { open, bytes, sha256: hash.digest("hex"), kind: fileKind(head, bytes) };
}

const isPicture = (kind: FileKind): kind is PictureKind => kind === "png" || kind === "jpeg" || kind === "webp";

/** A photograph drawn anew, without its metadata. Undefined when it can't be opened as the picture that it says it is. */
export async function photographOf(content: Content): Promise<Content | undefined> {
  if (!isPicture(content.kind)) return undefined;
  const parts: Uint8Array[] = [];
  for await (const piece of (await content.open()) as AsyncIterable<Uint8Array>) parts.push(piece);
  const clean = await cleanPicture(Buffer.concat(parts), content.kind);
  return clean && contentOf(async () => Readable.from([clean]), clean.byteLength);
}

export const contentKey = (sha256: string): string => `content/${sha256.slice(0, 2)}/${sha256}`;

/** Copies a file to its content address if nothing is there yet. */
export async function keepContent(content: Content): Promise<string> {
  const key = contentKey(content.sha256);
  if (!(await storage().head(key))) await storage().put(key, await content.open(), content.bytes);
  return key;
}
