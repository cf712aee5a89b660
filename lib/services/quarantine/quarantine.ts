import { createReadStream, createWriteStream } from "node:fs";
import { mkdir, mkdtemp, rm, stat } from "node:fs/promises";
import { tmpdir } from "node:os";
import path from "node:path";
import type { Readable } from "node:stream";
import { pipeline } from "node:stream/promises";
import { FileStore } from "@tus/file-store";
import { S3Store } from "@tus/s3-store";
import { Server, Upload, type DataStore } from "@tus/server";
import { env } from "@/lib/env/env";

/** Largest piece that one request carries; the web server in front buffers no more than this. */
export const pieceBytes = 8_000_000;

/** The path under which the open protocol for resumable uploads (tus 1.0.0) is spoken. */
export const tusPath = "/api/v1/uploads/tus";

function folder(): string {
  return path.resolve(env().DATA_DIR ?? "data", "quarantine");
}

let opened: Promise<DataStore> | undefined;

function store(): Promise<DataStore> {
  opened ??= openStore();
  return opened;
}

async function openStore(): Promise<DataStore> {
  const settings = env();
  if (settings.S3_BUCKET === undefined) {
    await mkdir(folder(), { recursive: true, mode: 0o700 });
    return new FileStore({ directory: folder() });
  }
  return new S3Store({
    partSize: pieceBytes,
    s3ClientConfig: {
      bucket: settings.S3_BUCKET,
      region: settings.S3_REGION,
      forcePathStyle: true,
      ...(settings.S3_ENDPOINT && { endpoint: settings.S3_ENDPOINT }),
      ...(settings.S3_ACCESS_KEY_ID &&
        settings.S3_SECRET_ACCESS_KEY && {
          credentials: { accessKeyId: settings.S3_ACCESS_KEY_ID, secretAccessKey: settings.S3_SECRET_ACCESS_KEY },
        }),
    },
  });
}

/** Makes the place that an announced upload's bytes come to: its length is fixed from here on. */
export async function openQuarantine(key: string, bytes: number): Promise<void> {
  await (await store()).create(new Upload({ id: key, size: bytes, offset: 0 }));
}

/**
 * A server of tus over web requests. It makes no uploads: places are opened where they are announced. One a process,
 * since two pieces of one upload wait for each other by a lock that it holds.
 *
 * @param finished all bytes of a key are there
 * @param onFault what failed without the sender's doing; the sender is told no more than that it did
 */
export async function tusServer(
  finished: (key: string) => Promise<void>,
  onFault: (error: unknown) => void,
): Promise<Server> {
  return new Server({
    path: tusPath,
    datastore: await store(),
    relativeLocation: true,
    respectForwardedHeaders: false,
    // No other site's pages may speak to it.
    allowedOrigins: [],
    async onUploadFinish(_request, upload) {
      await finished(upload.id);
      return {};
    },
    onResponseError(_request, error) {
      if ("status_code" in error && error.status_code < 500) return undefined;
      onFault(error);
      return { status_code: 500, body: "The piece could not be kept. Try again in a moment.\n" };
    },
  });
}

/** How many bytes of a key have come. Undefined when nothing is kept under it. */
export async function quarantinedBytes(key: string): Promise<number | undefined> {
  const from = await store();
  return from.getUpload(key).then(
    (upload) => upload.offset,
    () => undefined,
  );
}

/** The bytes of a finished upload, as often as they are asked for. */
export async function quarantined(key: string): Promise<{ open: () => Promise<Readable>; bytes: number }> {
  const from = await store();
  if (from instanceof S3Store) {
    const upload = await from.getUpload(key);
    return { open: async () => from.read(key), bytes: upload.size ?? 0 };
  }
  const file = path.join(folder(), key);
  return { open: async () => createReadStream(file), bytes: (await stat(file)).size };
}

/** Does work on a stream's bytes as a file of this machine, which is gone afterwards. */
export async function asLocalFile<T>(body: Readable, work: (file: string) => Promise<T>): Promise<T> {
  const place = await mkdtemp(path.join(tmpdir(), "fanfold-file-"));
  try {
    const file = path.join(place, "body");
    await pipeline(body, createWriteStream(file, { mode: 0o600, flags: "wx" }));
    return await work(file);
  } finally {
    await rm(place, { recursive: true, force: true });
  }
}

/** Forgets an upload's bytes; what is not there is no error. */
export async function dropQuarantined(key: string): Promise<void> {
  const from = await store();
  if (from instanceof S3Store) await from.remove(key).catch(() => undefined);
  else {
    await rm(path.join(folder(), key), { force: true });
    await rm(path.join(folder(), `${key}.json`), { force: true });
  }
}
