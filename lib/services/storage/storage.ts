import type { Readable } from "node:stream";

export interface StoredHead {
  bytes: number;
  modifiedAt: Date;
}

/** First and last byte, both included, as in HTTP. */
export interface ByteRange {
  first: number;
  last: number;
}

export interface StoredBody {
  body: Readable;
  /** Bytes in the body: those of the range when one was asked for. */
  bytes: number;
}

/** Files under keys. Every implementation passes the same contract test. */
export interface Storage {
  /**
   * Stores a file whole or not at all; an earlier one of that key is replaced.
   *
   * @param bytes the length, which the body must have, else it throws and nothing is stored
   */
  put(key: string, body: Readable | Uint8Array, bytes: number): Promise<void>;
  /** @throws FileMissingError when the key holds nothing; RangeError when the range begins at or beyond the end */
  get(key: string, range?: ByteRange): Promise<StoredBody>;
  /** Undefined when the key holds nothing. */
  head(key: string): Promise<StoredHead | undefined>;
  /** Deleting what isn't there is no error. */
  delete(key: string): Promise<void>;
  /** Copies to a key that holds nothing yet; "present" leaves what is there. @throws FileMissingError without a source */
  copyIfAbsent(from: string, to: string): Promise<"copied" | "present">;
  /** Resolves when files can be stored, else throws. */
  ready(): Promise<void>;
}

export class FileMissingError extends Error {
  override name = "FileMissingError";
  constructor(readonly key: string) {
    super(`No file is stored under ${key}.`);
  }
}

const keyPattern = /^[a-z0-9][a-z0-9._-]*(\/[a-z0-9][a-z0-9._-]*)*$/;

/** Keys are lower case, parts between slashes, no part beginning with a dot: they can't climb out of a folder. */
export function checkKey(key: string): string {
  if (!keyPattern.test(key) || key.length > 512)
    throw new TypeError("A storage key has a character that it may not have.");
  return key;
}

/** A range cut to the file. @throws RangeError when it begins at or beyond the end, or ends before it begins */
export function rangeWithin(range: ByteRange, bytes: number): ByteRange {
  const last = Math.min(range.last, bytes - 1);
  if (!(Number.isInteger(range.first) && range.first >= 0 && range.first <= last)) {
    throw new RangeError("The range lies outside the file.");
  }
  return { first: range.first, last };
}
