import { Readable } from "node:stream";
import {
  CopyObjectCommand,
  DeleteObjectCommand,
  GetObjectCommand,
  HeadBucketCommand,
  HeadObjectCommand,
  PutObjectCommand,
  S3Client,
  S3ServiceException,
} from "@aws-sdk/client-s3";
import { checkKey, FileMissingError, rangeWithin, type Storage } from "./storage";

export interface S3Options {
  bucket: string;
  region: string;
  /** Undefined takes the region's own address; with one, the bucket stands in the path, as most compatible stores want. */
  endpoint?: string;
  /** Undefined tries the SDK's usual chain. */
  credentials?: { accessKeyId: string; secretAccessKey: string };
}

export function s3Client({ region, endpoint, credentials }: S3Options): S3Client {
  return new S3Client({
    region,
    ...(endpoint !== undefined && { endpoint, forcePathStyle: true }),
    ...(credentials && { credentials }),
    // Without one it writes to the console; what matters is thrown.
    logger: { trace: nothing, debug: nothing, info: nothing, warn: nothing, error: nothing },
    // Compatible stores differ on the newer trailing checksums; the length is compared here and the hash by the caller.
    requestChecksumCalculation: "WHEN_REQUIRED",
    responseChecksumValidation: "WHEN_REQUIRED",
  });
}

function nothing(): void {}

/** Keeps files in an S3-compatible store. */
export function s3Storage(options: S3Options, client: S3Client = s3Client(options)): Storage {
  const Bucket = options.bucket;
  const head: Storage["head"] = async (key) => {
    try {
      const found = await client.send(new HeadObjectCommand({ Bucket, Key: checkKey(key) }));
      return { bytes: found.ContentLength ?? 0, modifiedAt: found.LastModified ?? new Date(0) };
    } catch (error) {
      if (isMissing(error)) return undefined;
      throw error;
    }
  };
  return {
    head,
    async put(key, body, bytes) {
      checkKey(key);
      if (body instanceof Uint8Array && body.byteLength !== bytes) throw wrongLength(body.byteLength, bytes);
      const about = { Bucket, Key: key, ContentLength: bytes };
      if (body instanceof Uint8Array) await client.send(new PutObjectCommand({ ...about, Body: body }));
      else await putStream(client, about, Readable.from(exactly(body, bytes)));
    },
    async get(key, range) {
      const found = await head(key);
      if (!found) throw new FileMissingError(key);
      const part = range && rangeWithin(range, found.bytes);
      const Range = part && `bytes=${part.first}-${part.last}`;
      try {
        const got = await client.send(new GetObjectCommand({ Bucket, Key: key, Range }));
        if (!(got.Body instanceof Readable)) throw new Error("The store answered without a body.");
        return { body: got.Body, bytes: got.ContentLength ?? found.bytes };
      } catch (error) {
        if (isMissing(error)) throw new FileMissingError(key);
        throw error;
      }
    },
    async delete(key) {
      await client.send(new DeleteObjectCommand({ Bucket, Key: checkKey(key) }));
    },
    async copyIfAbsent(from, to) {
      checkKey(from);
      // Not one step in S3: two that copy at once both write, which is harmless where the key is the content's hash.
      if (!(await head(from))) throw new FileMissingError(from);
      if (await head(to)) return "present";
      await client.send(new CopyObjectCommand({ Bucket, Key: to, CopySource: encodeURI(`${Bucket}/${from}`) }));
      return "copied";
    },
    async ready() {
      await client.send(new HeadBucketCommand({ Bucket }));
    },
  };
}

/** Sends a stream; one that fails breaks the request off, and its own error is what is thrown. */
async function putStream(
  client: S3Client,
  about: { Bucket: string; Key: string; ContentLength: number },
  body: Readable,
): Promise<void> {
  const breakOff = new AbortController();
  let failure: unknown;
  body.once("error", (error) => {
    failure = error;
    breakOff.abort();
  });
  try {
    await client.send(new PutObjectCommand({ ...about, Body: body }), { abortSignal: breakOff.signal });
  } catch (error) {
    throw failure ?? error;
  } finally {
    body.destroy();
  }
}

/** Passes a body through and breaks off when it isn't as long as announced, so that the request fails. */
async function* exactly(body: Readable, bytes: number): AsyncGenerator<Uint8Array> {
  let seen = 0;
  for await (const chunk of body) {
    const part = typeof chunk === "string" ? Buffer.from(chunk) : (chunk as Uint8Array);
    seen += part.byteLength;
    if (seen > bytes) throw wrongLength(seen, bytes);
    yield part;
  }
  if (seen !== bytes) throw wrongLength(seen, bytes);
}

function wrongLength(seen: number, announced: number): RangeError {
  return new RangeError(`The file has ${seen} bytes instead of the ${announced} that were announced.`);
}

function isMissing(error: unknown): boolean {
  return error instanceof S3ServiceException && (error.name === "NotFound" || error.name === "NoSuchKey");
}
